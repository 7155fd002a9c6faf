import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { Endpoint, ReplyOf } from '#contracts/endpoint.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { call, type CallInput } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { useShop } from '#src/lib/session.ts';

/** Sends a write of the set-up and lets everything that shows it ask again, also where it failed. */
export function useSetUpWrite<E extends Endpoint>(endpoint: E, onDone?: (reply: ReplyOf<E>) => void) {
  const client = useQueryClient();
  const shop = useShop();
  return useMutation({
    mutationFn: (input: CallInput<E>) => call(endpoint, input),
    onSuccess: (reply) => onDone?.(reply),
    onSettled: async () => {
      await client.invalidateQueries({ queryKey: shopKey(shop.id, 'setup') });
      void client.invalidateQueries({ queryKey: shopKey(shop.id, 'day') });
    },
  });
}

/**
 * The thing that a form began with. Where somebody else changed it meanwhile, what was typed stays, the note says what they
 * made of it, and the next save goes over theirs.
 */
export function useBase<T extends { version: number }>(thing: T) {
  const [base, setBase] = useState(thing);
  return {
    base,
    version: base.version,
    /** Keeps what it is now, from the answer that says it is stale. @returns what it is now, null for other errors */
    takeStale: (error: unknown): T | null => {
      if (!isApiError(error, 'stale') || typeof error.current !== 'object' || error.current === null) return null;
      const current = { ...thing, ...(error.current as Partial<T>) };
      setBase(current);
      return current;
    },
  };
}
