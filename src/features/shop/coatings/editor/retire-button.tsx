import { useState } from 'react';
import { changeCoating, type CoatingDetail } from '#contracts/coatings.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { useCoatingWrite, useKeepCoating } from '../data/use-coating-write.ts';

/** Out of use and back again. */
export function RetireButton({ coating }: { coating: CoatingDetail }) {
  const shop = useShop();
  const keep = useKeepCoating();
  const [asked, setAsked] = useState(false);
  const change = useCoatingWrite(changeCoating, (saved) => {
    keep(saved);
    setAsked(false);
    showToast(saved.retiredAt === null ? `${saved.name} is in use again` : `${saved.name} is retired`, {
      tone: 'good',
    });
  });
  const set = (retired: boolean) =>
    change.mutate({
      params: { shopId: shop.id, coatingId: coating.id },
      body: { version: coating.version, retired },
    });
  if (coating.retiredAt !== null)
    return (
      <Button busy={change.isPending} onClick={() => set(false)}>
        Bring back
      </Button>
    );
  const names = coating.usedBy.map(({ name }) => name);
  return (
    <>
      <Button look="quiet" onClick={() => setAsked(true)}>
        Retire
      </Button>
      <Dialog
        open={asked}
        onOpenChange={setAsked}
        title={`Retire ${coating.name}`}
        about="It is no longer offered for process sheets. It is kept and can be brought back."
        actions={
          <>
            <Button onClick={() => setAsked(false)}>Keep it</Button>
            <Button look="primary" busy={change.isPending} onClick={() => set(true)}>
              Retire it
            </Button>
          </>
        }
      >
        {names.length > 0 && <p>These process sheets name it and keep its times: {names.join(', ')}.</p>}
        {change.error !== null && <ErrorNote error={change.error} what={`${coating.name} stays in use.`} />}
      </Dialog>
    </>
  );
}
