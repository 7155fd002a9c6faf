import { takeHours } from '#contracts/first-steps.ts';
import { weekdays, type Weekday } from '#contracts/recurrence.ts';
import { paths } from '#src/app/paths.ts';
import { parseLooseTime } from '#src/lib/loose-time.ts';
import { useShop } from '#src/lib/session.ts';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { weekdayWord } from '../parts/recurrence-words.ts';
import { readWith, useTypedForm } from '../parts/use-typed-form.ts';
import { ZoneField } from '../parts/zone-field.tsx';
import { useTakeStep } from './first-steps-query.ts';
import { clockText, sayFault } from './numbers.ts';
import { StepForm } from './step-form.tsx';

type Form = { timeZone: string; days: Weekday[]; from: string; to: string };
const usual = { days: ['MO', 'TU', 'WE', 'TH', 'FR'] satisfies Weekday[], from: '7:00', to: '18:00' };

const read = (form: Form) =>
  readWith(takeHours.body, {
    ...form,
    from: clockText(parseLooseTime(form.from), form.from),
    to: clockText(parseLooseTime(form.to), form.to),
  });

export function HoursStep({ onTaken }: { onTaken: () => void }) {
  const shop = useShop();
  const { form, change, faults, submit, drop } = useTypedForm<Form, ReturnType<typeof takeHours.body.parse>>(
    `first-steps.hours.${shop.id}`,
    { ...usual, timeZone: shop.timeZone },
    read,
  );
  const take = useTakeStep(takeHours, () => {
    drop();
    onTaken();
  });
  const turn = (day: Weekday, on: boolean) =>
    change({ days: weekdays.filter((one) => (one === day ? on : form.days.includes(one))) });
  return (
    <StepForm
      busy={take.isPending}
      error={take.error}
      editors={[{ to: paths.hours(), label: 'All hours and closures' }]}
      onSend={() => submit((value) => take.mutate(value))}
    >
      <ZoneField
        value={form.timeZone}
        error={sayFault(faults.timeZone)}
        onChange={(timeZone) => change({ timeZone })}
      />
      <fieldset>
        <legend className="mb-1 text-[0.8125rem] font-semibold">Open on</legend>
        <div className="flex flex-wrap gap-x-5">
          {weekdays.map((day) => (
            <Checkbox
              key={day}
              label={weekdayWord[day]}
              checked={form.days.includes(day)}
              onChange={(event) => turn(day, event.target.checked)}
            />
          ))}
        </div>
        {faults.days !== undefined && <p className="text-xs font-semibold text-crimson">Choose at least one day.</p>}
      </fieldset>
      <div className="grid max-w-sm grid-cols-2 gap-3">
        <TextField
          label="From"
          autoComplete="off"
          value={form.from}
          error={sayFault(faults.from)}
          onChange={(event) => change({ from: event.target.value })}
        />
        <TextField
          label="To"
          autoComplete="off"
          value={form.to}
          error={sayFault(faults.to)}
          onChange={(event) => change({ to: event.target.value })}
        />
      </div>
    </StepForm>
  );
}
