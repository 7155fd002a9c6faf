import { queryOptions } from '@tanstack/react-query';
import { listCoatings } from '#contracts/coatings.ts';
import { readDay } from '#contracts/day.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { shopCircuits } from './model/circuit.ts';

export const coatingsQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'sheets', 'coatings'),
    queryFn: ({ signal }) => call(listCoatings, { params: { shopId }, signal }),
    staleTime: 5 * 60_000,
  });

/** Lamps and circuits stand in every view of a day; a minute of it is enough. */
export const circuitsQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'sheets', 'circuits'),
    queryFn: async ({ signal }) => {
      const from = new Date();
      const query = { from: from.toISOString(), to: new Date(from.getTime() + 60_000).toISOString() };
      return shopCircuits(await call(readDay, { params: { shopId }, query, signal }));
    },
    staleTime: 5 * 60_000,
  });
