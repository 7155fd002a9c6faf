import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { isApiError } from './api-error.ts';

/** Told when a call finds that nobody is signed in any more; the shell shows the sign-in. */
type Lost = () => void;

export function makeQueryClient(onSignedOut: Lost): QueryClient {
  const onError = (error: unknown) => {
    if (isApiError(error, 'not-signed-in')) onSignedOut();
  };
  return new QueryClient({
    queryCache: new QueryCache({ onError }),
    mutationCache: new MutationCache({ onError }),
    defaultOptions: {
      queries: {
        // Live notices say when something changed; this only bounds what a missed notice could cost.
        staleTime: 30_000,
        // Tried in any case: a failure is said and can be tried again, a pause would look like work that never ends.
        networkMode: 'always',
        refetchOnReconnect: true,
        retry: (failures, error) => isWorthRetrying(error) && failures < 3,
        retryDelay: (failures) => Math.min(8_000, 500 * 2 ** failures),
      },
      // A write is sent again only by the person, who sees what came of it, with the key that makes it count once.
      mutations: { retry: false, networkMode: 'always' },
    },
  });
}

/** A refusal stays a refusal; no answer, or a server in trouble, may pass. */
const isWorthRetrying = (error: unknown): boolean =>
  isApiError(error) && (error.status === 0 || error.status >= 500) && error.code !== 'internal';
