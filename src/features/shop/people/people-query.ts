import { queryOptions, useMutation, useQueryClient, type QueryClient } from '@tanstack/react-query';
import type { Endpoint, ReplyOf } from '#contracts/endpoint.ts';
import { listPeople } from '#contracts/people.ts';
import { call, type CallInput } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { useShop } from '#src/lib/session.ts';

export type Roster = ReplyOf<typeof listPeople>;

export const peopleQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'people'),
    queryFn: ({ signal }) => call(listPeople, { params: { shopId }, signal }),
  });

export const askAgain = (client: QueryClient, shopId: string) =>
  client.invalidateQueries({ queryKey: shopKey(shopId, 'people') });

/** A deed on the roster; what it changed is asked for again, also where it was refused as stale. */
export function useDeed<E extends Endpoint>(endpoint: E, onDone: (reply: ReplyOf<E>) => void) {
  const shop = useShop();
  const client = useQueryClient();
  return useMutation({
    mutationFn: (input: CallInput<E>) => call(endpoint, input),
    onSuccess: onDone,
    onSettled: () => askAgain(client, shop.id),
  });
}
