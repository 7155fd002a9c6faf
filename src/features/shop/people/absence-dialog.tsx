import { useId, useState } from 'react';
import { addAbsence, type Clash, type Person } from '#contracts/people.ts';
import { addDays } from '#src/lib/calendar-days.ts';
import { parseLooseTime } from '#src/lib/loose-time.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { instantOf } from '#src/lib/wall-clock.ts';
import { Button } from '#src/ui/button.tsx';
import { DateTimeField, type DateTimeText } from '#src/ui/date-time-field.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { useDeed } from './people-query.ts';

type AbsenceDialogProps = {
  person: Person;
  onClose: () => void;
  onClashes: (name: string, clashes: Clash[]) => void;
};

/** Away from a day to a day, both included; with times for part of a day; without an end until further notice. */
export function AbsenceDialog({ person, onClose, onClashes }: AbsenceDialogProps) {
  const shop = useShop();
  const { zone, today } = useFormats();
  const formId = useId();
  const [from, setFrom] = useState<DateTimeText>({ day: today(), time: '' });
  const [to, setTo] = useState<DateTimeText>({ day: today(), time: '' });
  const [reason, setReason] = useState('');
  const [tried, setTried] = useState(false);
  const add = useDeed(addAbsence, ({ clashes }) => {
    showToast(`${person.name} is entered as away`, { tone: 'good' });
    onClose();
    if (clashes.length > 0) onClashes(person.name, clashes);
  });
  const start = momentOf(from, zone, 'from');
  const end = to.day === '' && to.time === '' ? null : momentOf(to, zone, 'to');
  const endFault =
    end === undefined
      ? 'Choose a day, or leave both empty for until further notice.'
      : end !== null && start !== undefined && end <= start
        ? 'It ends before it begins.'
        : undefined;
  const send = () => {
    setTried(true);
    if (start === undefined || end === undefined || endFault !== undefined) return;
    add.mutate({
      params: { shopId: shop.id, personId: person.id },
      body: {
        from: new Date(start).toISOString(),
        to: end === null ? null : new Date(end).toISOString(),
        reason: reason.trim(),
      },
    });
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`${person.name} is away`}
      about="Posted work in that time is shown to you, not moved."
      actions={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button type="submit" form={formId} look="primary" busy={add.isPending}>
            Enter
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
        <DateTimeField
          label="From"
          hint="Without a time: from the start of the day."
          value={from}
          onChange={setFrom}
          error={tried && start === undefined ? 'Choose the first day.' : undefined}
        />
        <DateTimeField
          label="To"
          hint="Without a time: the whole day belongs to it. Empty: until further notice."
          value={to}
          onChange={setTo}
          error={tried ? endFault : undefined}
        />
        <TextField
          label="Reason"
          optional
          hint="Only leads and owners see it."
          maxLength={200}
          value={reason}
          onChange={(event) => setReason(event.target.value)}
        />
        {add.isError && <ErrorNote error={add.error} what="Nothing was entered." />}
      </form>
    </Dialog>
  );
}

/** The instant, undefined where nothing usable was typed. */
function momentOf({ day, time }: DateTimeText, zone: string, side: 'from' | 'to'): number | undefined {
  if (!/^\d{4}-\d\d-\d\d$/.test(day)) return undefined;
  if (time.trim() === '') return instantOf(side === 'from' ? day : addDays(day, 1), 0, zone);
  const minutes = parseLooseTime(time);
  return minutes === null ? undefined : instantOf(day, minutes, zone);
}
