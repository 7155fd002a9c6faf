import { queryOptions } from '@tanstack/react-query';
import { readDay } from '#contracts/day.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';

export type DayAsked = { shopId: string; from: string; to: string; plan: 'posted' | 'draft' };

/** Everything of the booth day of a shop begins with this key. */
export const dayKey = (shopId: string) => shopKey(shopId, 'day');

export const dayQuery = ({ shopId, from, to, plan }: DayAsked) =>
  queryOptions({
    queryKey: [...dayKey(shopId), plan, from, to],
    queryFn: ({ signal }) => call(readDay, { params: { shopId }, query: { from, to, plan }, signal }),
  });
