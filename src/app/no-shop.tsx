import type { Me } from '#contracts/session.ts';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { Button } from '#src/ui/button.tsx';
import { useSignOut } from './use-sign-out.ts';

/** Signed in, and member of no shop (any more). */
export function NoShop({ me }: { me: Me }) {
  const signOut = useSignOut();
  return (
    <main className="flex min-h-dvh items-center justify-center">
      <EmptyState
        title="You belong to no shop"
        action={
          <Button busy={signOut.isPending} onClick={() => signOut.mutate()}>
            Sign out
          </Button>
        }
      >
        <p>
          You are signed in as {me.account.email}. Ask an owner of your shop to invite this address; the letter brings
          you in.
        </p>
      </EmptyState>
    </main>
  );
}
