import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect, useId, useRef, useState } from 'react';
import { resetDemo, resetWords } from '#contracts/shops.ts';
import { call } from '#src/lib/api.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Progress } from '#src/ui/progress.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { firstStepsQuery } from './first-steps-query.ts';

/** Puts the demo shop back as on its first day. Asks for words, since everything that was tried in it goes. */
export function ResetDemo({ resetting }: { resetting: boolean }) {
  const [isOpen, setOpen] = useState(false);
  useTellWhenDone(resetting);
  return (
    <section className="card flex flex-wrap items-center justify-between gap-3 p-4" aria-labelledby="demo">
      <div>
        <h2 id="demo">This is the demo shop</h2>
        <p className="text-muted">Try whatever you like; it can be put back as it was, in the middle of this week.</p>
      </div>
      {resetting ? (
        <div role="status" className="flex min-w-48 flex-col gap-1.5">
          <p>It is being put back. Until that is done everything is as it was.</p>
          <Progress label="The demo is being put back" value={null} />
        </div>
      ) : (
        <Button onClick={() => setOpen(true)}>Reset the demo</Button>
      )}
      {isOpen && <ResetDialog onClose={() => setOpen(false)} />}
    </section>
  );
}

/** Live notices fetch every page's contents again; this only says so. */
function useTellWhenDone(resetting: boolean): void {
  const was = useRef(resetting);
  useEffect(() => {
    if (was.current && !resetting) showToast('The demo is as on its first day', { tone: 'good' });
    was.current = resetting;
  }, [resetting]);
}

function ResetDialog({ onClose }: { onClose: () => void }) {
  const shop = useShop();
  const client = useQueryClient();
  const formId = useId();
  const [words, setWords] = useState('');
  const [tried, setTried] = useState(false);
  const isRight = words.trim().toLowerCase() === resetWords;
  const reset = useMutation({
    mutationFn: () => call(resetDemo, { params: { shopId: shop.id }, body: { words } }),
    onSuccess: async () => {
      await client.invalidateQueries({ queryKey: firstStepsQuery(shop.id).queryKey });
      onClose();
    },
  });
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && !reset.isPending && onClose()}
      title={`Reset ${shop.name}?`}
      about="All jobs, plans, people and settings of this shop go, for everybody who is in it, and the demo’s come back. Accounts stay."
      actions={
        <>
          <Button onClick={onClose}>Keep it</Button>
          <Button type="submit" form={formId} look="danger" busy={reset.isPending}>
            Reset the demo
          </Button>
        </>
      }
    >
      <form
        id={formId}
        noValidate
        className="flex flex-col gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          setTried(true);
          if (isRight) reset.mutate();
        }}
      >
        <TextField
          label={`Type “${resetWords}”`}
          autoComplete="off"
          value={words}
          error={tried && !isRight ? 'These are not the words.' : undefined}
          onChange={(event) => setWords(event.target.value)}
        />
        {reset.isError && <ErrorNote error={reset.error} what="The demo stays as it is." />}
      </form>
    </Dialog>
  );
}
