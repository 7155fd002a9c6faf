import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { readUse } from '#contracts/use.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';

export const reportQuery = (shopId: string, range: { from: string; to: string }) =>
  queryOptions({
    queryKey: shopKey(shopId, 'use', range),
    queryFn: ({ signal }) => call(readUse, { params: { shopId }, query: range, signal }),
    placeholderData: keepPreviousData,
  });
