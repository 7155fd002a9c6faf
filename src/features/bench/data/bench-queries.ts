import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { readBench } from '#contracts/bench.ts';
import { readDay } from '#contracts/day.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { addDays } from '#src/lib/calendar-days.ts';
import { instantOf } from '#src/lib/wall-clock.ts';

export type BenchAsked = { day: string | undefined; personId: string | undefined };

export const benchKey = (shopId: string) => shopKey(shopId, 'bench');
export const benchQuery = (shopId: string, { day, personId }: BenchAsked) =>
  queryOptions({
    queryKey: [...benchKey(shopId), day ?? 'today', personId ?? 'own'],
    queryFn: ({ signal }) =>
      call(readBench, {
        params: { shopId },
        query: { ...(day === undefined ? {} : { day }), ...(personId === undefined ? {} : { personId }) },
        signal,
      }),
    placeholderData: keepPreviousData,
    // Midnight and the plan's edges pass without a notice.
    refetchInterval: 5 * 60_000,
  });

/** Who has a bench: the people of the booth day. */
export const peopleQuery = (shopId: string, day: string, zone: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'members', 'people'),
    queryFn: async ({ signal }) => {
      const midnight = (of: string) => new Date(instantOf(of, 0, zone)).toISOString();
      const query = { from: midnight(day), to: midnight(addDays(day, 1)), plan: 'posted' as const };
      const { rows } = await call(readDay, { params: { shopId }, query, signal });
      return rows.flatMap(({ id, kind, name }) => (kind === 'person' ? [{ id, name }] : []));
    },
    staleTime: 10 * 60_000,
  });
