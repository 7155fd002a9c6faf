import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { CoatingDetail } from '#contracts/coatings.ts';
import type { Endpoint, ReplyOf } from '#contracts/endpoint.ts';
import { call, type CallInput } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { useShop } from '#src/lib/session.ts';
import { coatingQuery } from './coating-queries.ts';

/** Sends a write of data sheets and lets everything that shows them ask again, also where it failed. */
export function useCoatingWrite<E extends Endpoint>(endpoint: E, onDone?: (reply: ReplyOf<E>) => void) {
  const client = useQueryClient();
  const shop = useShop();
  return useMutation({
    mutationFn: (input: CallInput<E>) => call(endpoint, input),
    onSuccess: (reply) => onDone?.(reply),
    onSettled: () => client.invalidateQueries({ queryKey: shopKey(shop.id, 'sheets') }),
  });
}

/** Puts an answered data sheet where its page reads it, so that nothing flickers. */
export function useKeepCoating(): (coating: CoatingDetail) => void {
  const client = useQueryClient();
  const shop = useShop();
  return (coating) => client.setQueryData(coatingQuery(shop.id, coating.id).queryKey, coating);
}
