import { useId, useState } from 'react';
import type { Clash } from '#contracts/clashes.ts';
import { setWeek, type WeekSpan } from '#contracts/hours.ts';
import { weekdays, type Weekday } from '#contracts/recurrence.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { useLocalDraft } from '#src/lib/local-draft.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { ChangedMeanwhile } from '../parts/changed-meanwhile.tsx';
import { weekdayWord } from '../parts/recurrence-words.ts';
import { useBase, useSetUpWrite } from '../parts/use-set-up-write.ts';
import { readWeek, sayDay, weekForm, type WeekForm } from './model/week-form.ts';

type WeekDialogProps = {
  hours: { version: number; week: readonly WeekSpan[] };
  onClose: () => void;
  onSaved: (what: string, clashes: Clash[]) => void;
};

const isWeekForm = (value: unknown): value is WeekForm =>
  typeof value === 'object' && value !== null && weekdays.every((day) => day in value);

/** The usual week, a line a day. */
export function WeekDialog({ hours, onClose, onSaved }: WeekDialogProps) {
  const shop = useShop();
  const { clock, today } = useFormats();
  const formId = useId();
  const base = useBase(hours);
  const draft = useLocalDraft(`week.${shop.id}`, weekForm(hours.week, clock), isWeekForm);
  const [form, setForm] = useState(draft.start);
  const [from, setFrom] = useState(today());
  const [isTried, setTried] = useState(false);
  const read = readWeek(form);
  const faults = (isTried && read.faults) || {};
  const save = useSetUpWrite(setWeek, ({ clashes }) => {
    draft.drop();
    showToast('The opening hours are saved', { tone: 'good' });
    onSaved('The new week', clashes);
    onClose();
  });
  const change = (day: Weekday, text: string) => {
    const next = { ...form, [day]: text };
    setForm(next);
    draft.keep(next);
  };
  const send = () => {
    setTried(true);
    if (read.week === null) return;
    save.mutate(
      { params: { shopId: shop.id }, body: { version: base.version, from, week: read.week } },
      { onError: (error) => void base.takeStale(error) },
    );
  };
  const leave = () => {
    draft.drop();
    onClose();
  };
  const isStale = isApiError(save.error, 'stale');
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && leave()}
      shape="panel"
      title="The usual week"
      about="What was open before the first day stays as it was, so that reports of the past stay true."
      actions={
        <>
          <Button onClick={leave}>Leave it</Button>
          <Button type="submit" form={formId} look="primary" busy={save.isPending}>
            Save
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
          send();
        }}
      >
        <TextField
          label="From day"
          type="date"
          min={today()}
          value={from}
          onChange={(event) => setFrom(event.target.value)}
        />
        {weekdays.map((day, i) => {
          const before = weekdays[i - 1];
          return (
            <div key={day} className="flex items-end gap-2">
              <TextField
                label={weekdayWord[day]}
                className="grow"
                autoComplete="off"
                placeholder="closed"
                error={faults[day]}
                value={form[day]}
                onChange={(event) => change(day, event.target.value)}
              />
              {before && form[before] !== form[day] && (
                <Button onClick={() => change(day, form[before])}>
                  As {weekdayWord[before].slice(0, 3)} <span className="sr-only">on {weekdayWord[day]}</span>
                </Button>
              )}
            </div>
          );
        })}
        <p className="text-xs text-muted">7:00-18:00, or 7-12, 13-18; nothing where the shop is closed.</p>
        {isStale && (
          <ChangedMeanwhile>
            <p>
              Now it says:{' '}
              {weekdays
                .map(
                  (day) =>
                    `${day.charAt(0)}${day.charAt(1).toLowerCase()} ${sayDay(base.base.week, day, clock) || 'closed'}`,
                )
                .join('; ')}
              .
            </p>
          </ChangedMeanwhile>
        )}
        {save.isError && !isStale && <ErrorNote error={save.error} what="The hours stay as they were." />}
      </form>
    </Dialog>
  );
}
