import { useId, useState } from 'react';
import { v7 as uuid } from 'uuid';
import { addFilterEntry, type Filter } from '#contracts/upkeep.ts';
import { parseLooseTime } from '#src/lib/loose-time.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { instantOf } from '#src/lib/wall-clock.ts';
import { Button } from '#src/ui/button.tsx';
import { DateTimeField } from '#src/ui/date-time-field.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { readTyped } from '../parts/typed.ts';
import { useSetUpWrite } from '../parts/use-set-up-write.ts';

type LogDialogProps = { filter: Filter; placeName: string; kind: 'change' | 'pressure'; onClose: () => void };

/** A filter was changed, or its gauge was read: now, or when it happened. */
export function LogDialog({ filter, placeName, kind, onClose }: LogDialogProps) {
  const shop = useShop();
  const { zone, today, time } = useFormats();
  const formId = useId();
  // Named once, so that the same press sent twice is one entry.
  const [entryId] = useState(() => uuid());
  const [at, setAt] = useState(() => ({ day: today(), time: time(new Date()) }));
  const [pascals, setPascals] = useState('');
  const [note, setNote] = useState('');
  const [isTried, setTried] = useState(false);
  const minutes = parseLooseTime(at.time);
  const isDay = /^\d{4}-\d\d-\d\d$/.test(at.day);
  const read = readTyped(pascals);
  const needsPascals = kind === 'pressure' || pascals.trim() !== '';
  const pascalFault =
    needsPascals && (read === null || read < 0) ? 'Enter the pascals that the gauge shows.' : undefined;
  const timeFault = minutes === null || !isDay ? 'Enter a day and a time.' : undefined;
  const add = useSetUpWrite(addFilterEntry, () => {
    showToast(kind === 'change' ? `${filter.name}: the change is noted` : `${filter.name}: the reading is noted`, {
      tone: 'good',
    });
    onClose();
  });
  const send = () => {
    setTried(true);
    if (timeFault || pascalFault || minutes === null) return;
    add.mutate({
      params: { shopId: shop.id, filterId: filter.id },
      body: { id: entryId, kind, at: new Date(instantOf(at.day, minutes, zone)).toISOString(), pascals: read, note },
    });
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={kind === 'change' ? `${filter.name} was changed` : `Pressure at ${filter.name}`}
      about={placeName}
      actions={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button type="submit" form={formId} look="primary" busy={add.isPending}>
            Note it
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
          send();
        }}
      >
        <TextField
          label={kind === 'change' ? 'Pressure after it, Pa' : 'Pressure, Pa'}
          optional={kind === 'change'}
          inputMode="decimal"
          autoComplete="off"
          hint={filter.pascalLimit === null ? undefined : `Changed at ${filter.pascalLimit} Pa.`}
          error={isTried ? pascalFault : undefined}
          value={pascals}
          onChange={(event) => setPascals(event.target.value)}
        />
        <DateTimeField label="When" value={at} onChange={setAt} error={isTried ? timeFault : undefined} />
        <TextField
          label="Note"
          optional
          maxLength={400}
          autoComplete="off"
          value={note}
          onChange={(event) => setNote(event.target.value)}
        />
        {add.isError && <ErrorNote error={add.error} what="Nothing was noted." />}
      </form>
    </Dialog>
  );
}
