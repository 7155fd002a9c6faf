import { useId, useState } from 'react';
import type { Clash } from '#contracts/clashes.ts';
import { addOpening, removeOpening, type ExtraOpening } from '#contracts/hours.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { newRecurrence, readRecurrence } from '../parts/recurrence.ts';
import { RecurrenceEditor } from '../parts/recurrence-editor.tsx';
import { sayRecurrence } from '../parts/recurrence-words.ts';
import { useSetUpWrite } from '../parts/use-set-up-write.ts';

type ExtraHoursProps = {
  extra: readonly ExtraOpening[];
  mayWrite: boolean;
  onSaved: (what: string, clashes: Clash[]) => void;
};

/** Hours beside the usual week: one Saturday, every second one. */
export function ExtraHours({ extra, mayWrite, onSaved }: ExtraHoursProps) {
  const shop = useShop();
  const { clock } = useFormats();
  const [isAdding, setAdding] = useState(false);
  const remove = useSetUpWrite(removeOpening, ({ clashes }) => onSaved('The change of hours', clashes));
  const putBack = useSetUpWrite(addOpening);
  const onRemove = ({ id, ...opening }: ExtraOpening) =>
    remove.mutate(
      { params: { shopId: shop.id, openingId: id } },
      {
        onSuccess: () =>
          showToast('The hours were removed', {
            act: { label: 'Undo', run: () => putBack.mutate({ params: { shopId: shop.id }, body: opening }) },
          }),
      },
    );
  if (extra.length === 0 && !mayWrite) return null;
  return (
    <section className="flex flex-col gap-2">
      <div className="flex flex-wrap items-center justify-between gap-2">
        <h3 className="font-semibold">Hours beside the week</h3>
        {mayWrite && (
          <Button size="small" onClick={() => setAdding(true)}>
            Add hours
          </Button>
        )}
      </div>
      {remove.isError && <ErrorNote error={remove.error} what="The hours stay." />}
      {extra.length === 0 ? (
        <p className="text-muted">None: one Saturday, say, or every second one.</p>
      ) : (
        <ul className="card">
          {extra.map((opening) => {
            const said = sayRecurrence(opening, clock);
            return (
              <li
                key={opening.id}
                className="flex flex-wrap items-center justify-between gap-x-4 border-b border-line px-4 py-1.5 last:border-0"
              >
                {said.charAt(0).toUpperCase() + said.slice(1)}
                {mayWrite && (
                  <Button size="small" look="quiet" onClick={() => onRemove(opening)}>
                    Remove <span className="sr-only">{said}</span>
                  </Button>
                )}
              </li>
            );
          })}
        </ul>
      )}
      {isAdding && <AddHours onClose={() => setAdding(false)} />}
    </section>
  );
}

function AddHours({ onClose }: { onClose: () => void }) {
  const shop = useShop();
  const { today } = useFormats();
  const formId = useId();
  const [form, setForm] = useState(() => newRecurrence(today(), { time: '8:00', end: '13:00' }));
  const [isTried, setTried] = useState(false);
  const read = readRecurrence(form, 'end');
  const isTooLong = read.value !== null && read.value.minutes > 1440;
  const add = useSetUpWrite(addOpening, () => {
    showToast('The hours are added', { tone: 'good' });
    onClose();
  });
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      shape="panel"
      title="Hours beside the week"
      about="The shop is open then as well. People still need a shift to be given work."
      actions={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button type="submit" form={formId} look="primary" busy={add.isPending}>
            Add the hours
          </Button>
        </>
      }
    >
      <form
        id={formId}
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => {
          event.preventDefault();
          setTried(true);
          if (read.value && !isTooLong) add.mutate({ params: { shopId: shop.id }, body: read.value });
        }}
      >
        <RecurrenceEditor
          value={form}
          onChange={setForm}
          measure="end"
          faults={isTried ? (isTooLong ? { end: 'At most a day at a time.' } : (read.faults ?? {})) : {}}
        />
        {add.isError && <ErrorNote error={add.error} what="No hours were added." />}
      </form>
    </Dialog>
  );
}
