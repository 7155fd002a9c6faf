import type { Shift } from '#contracts/people.ts';
import { weekdays, type Weekday } from '#contracts/recurrence.ts';
import { useFormats } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { weekdayWord } from '../parts/recurrence-words.ts';
import { newPerson, type PersonFaults, type PersonForm } from './model/person-form.ts';
import { sayShifts } from './model/say-week.ts';

type WeekFieldProps = {
  days: PersonForm['days'];
  onChange: (days: PersonForm['days']) => void;
  faults: PersonFaults;
  /** What stands now, shown where it is more than a week. */
  shifts: readonly Shift[];
};

/** Working hours by weekday. Monday's can be taken over for the other working days. */
export function WeekField({ days, onChange, faults, shifts }: WeekFieldProps) {
  const { clock } = useFormats();
  if (days === null)
    return (
      <section aria-label="Working hours" className="flex flex-col items-start gap-2">
        <h3 className="text-[0.8125rem] font-semibold">Working hours</h3>
        <ul className="list-disc pl-4.5">
          {sayShifts(shifts, clock).map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
        <p className="text-xs text-muted">These are more than the same hours each week. They stay as they are.</p>
        <Button size="small" onClick={() => onChange(newPerson().days)}>
          Make it a plain week
        </Button>
      </section>
    );
  const change = (day: Weekday, text: string) => onChange({ ...days, [day]: text });
  const copyMonday = () => onChange({ ...days, TU: days.MO, WE: days.MO, TH: days.MO, FR: days.MO });
  return (
    <fieldset className="flex flex-col gap-2">
      <legend className="mb-1 text-[0.8125rem] font-semibold">Working hours</legend>
      <p className="text-xs text-muted">
        Hours, with breaks behind them: 7:00-15:30 (9:30-9:45, 12:00-12:30). Empty is a day off; a shift into the night
        may end on the next day.
      </p>
      {weekdays.map((day) => (
        <div key={day} className="grid grid-cols-[2.5rem_minmax(0,1fr)] items-start gap-2">
          <span aria-hidden="true" className="flex min-h-control items-center">
            {weekdayWord[day].slice(0, 3)}
          </span>
          <TextField
            label={`${weekdayWord[day]}, hours and breaks`}
            hideLabel
            autoComplete="off"
            placeholder="off"
            error={faults[day]}
            value={days[day]}
            onChange={(event) => change(day, event.target.value)}
          />
        </div>
      ))}
      <Button size="small" look="quiet" className="self-start" onClick={copyMonday}>
        Monday’s hours until Friday
      </Button>
    </fieldset>
  );
}
