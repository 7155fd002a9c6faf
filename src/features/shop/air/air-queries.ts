import { keepPreviousData, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { listReadings, readAir, type AirView } from '#contracts/air.ts';
import type { Endpoint, ReplyOf } from '#contracts/endpoint.ts';
import { call, type CallInput } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { useShop } from '#src/lib/session.ts';

export const airQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'air', 'now'),
    queryFn: ({ signal }) => call(readAir, { params: { shopId }, signal }),
    // What a reading is worth changes with its age, also where nobody sends a new one.
    refetchInterval: 60_000,
  });

const DAY = 86_400_000;
export type Days = 1 | 7;

/** The last day or week of a zone, up to the server's time when the air was read. */
export const readingsQuery = (shopId: string, zoneId: string, days: Days, until: string) => {
  const to = new Date(Math.ceil(Date.parse(until) / 60_000) * 60_000 + 60_000);
  const from = new Date(to.getTime() - days * DAY);
  return queryOptions({
    queryKey: shopKey(shopId, 'air', 'readings', zoneId, days),
    queryFn: async ({ signal }) => {
      const query = { from: from.toISOString(), to: to.toISOString() };
      return { ...query, ...(await call(listReadings, { params: { shopId, zoneId }, query, signal })) };
    },
    placeholderData: keepPreviousData,
  });
};

/** A write about the air; everything that shows it asks again, also where it failed. */
export function useAirWrite<E extends Endpoint>(endpoint: E, onDone?: (reply: ReplyOf<E>) => void) {
  const client = useQueryClient();
  const shop = useShop();
  return useMutation({
    mutationFn: (input: CallInput<E>) => call(endpoint, input),
    onSuccess: (reply) => onDone?.(reply),
    onSettled: async () => {
      await client.invalidateQueries({ queryKey: shopKey(shop.id, 'air') });
      void client.invalidateQueries({ queryKey: shopKey(shop.id, 'day') });
    },
  });
}

export type { AirView };
