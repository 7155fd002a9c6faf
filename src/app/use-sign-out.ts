import { useMutation } from '@tanstack/react-query';
import { signOut } from '#contracts/session.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { call } from '#src/lib/api.ts';
import { dropAllLocalDrafts } from '#src/lib/local-draft.ts';
import { showToast } from '#src/ui/toast-store.ts';
import { paths } from './paths.ts';

/**
 * Ends the session. The page is loaded anew, so that nothing shown or typed is left in memory: the next person may sit at
 * the same screen.
 */
export function useSignOut() {
  return useMutation({
    mutationFn: () => call(signOut, {}),
    onSettled: (_reply, error) => {
      if (error && !isApiError(error, 'not-signed-in')) {
        showToast('You are still signed in: the server could not be reached.', { tone: 'bad' });
        return;
      }
      dropAllLocalDrafts();
      location.replace(paths.signIn());
    },
  });
}
