import type { Me } from '#contracts/session.ts';
import { NewShopForm } from '#src/features/shop/new-shop/new-shop-form.tsx';
import { rememberShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { useSignOut } from './use-sign-out.ts';

/** Signed in, and member of no shop (any more): open one, or have an owner invite one. */
export function NoShop({ me, onOpened }: { me: Me; onOpened: () => void }) {
  const signOut = useSignOut();
  return (
    <main className="mx-auto flex min-h-dvh max-w-md flex-col justify-center gap-4 px-4 py-8">
      <EmptyState title="You belong to no shop">
        <p>
          You are signed in as {me.account.email}. Ask an owner of your shop to invite this address; the letter brings
          you in. Or open a shop of your own.
        </p>
      </EmptyState>
      <section className="card p-5" aria-label="Open a shop">
        <NewShopForm
          onOpened={(shopId) => {
            rememberShop(shopId);
            onOpened();
          }}
        />
      </section>
      <Button look="quiet" className="self-center" busy={signOut.isPending} onClick={() => signOut.mutate()}>
        Sign out
      </Button>
    </main>
  );
}
