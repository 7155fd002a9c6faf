import { weekdays, type Weekday } from '#contracts/recurrence.ts';
import { cx } from '#src/lib/cx.ts';
import { useFormats } from '#src/lib/session.ts';
import { FieldNotes } from '#src/ui/field-notes.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { ranks, type RecurrenceFaults, type RecurrenceForm } from './recurrence.ts';
import { ordinal, rankWord, weekdayWord } from './recurrence-words.ts';

type Part = {
  value: RecurrenceForm;
  change: (more: Partial<RecurrenceForm>) => void;
  faults: RecurrenceFaults;
};

/** On which days it comes again, and when it stops. */
export function RecurrenceDays(part: Part) {
  const { value, change, faults } = part;
  switch (value.repeat) {
    case 'once':
      return null;
    case 'own':
      return (
        <TextField
          label="Rule"
          hint="A recurrence rule as RFC 5545 writes it, without a start."
          autoComplete="off"
          spellCheck={false}
          value={value.rule}
          error={faults.rule}
          onChange={(event) => change({ rule: event.target.value })}
        />
      );
    case 'daily':
    case 'weekly':
    case 'monthly':
    case 'yearly':
      return (
        <>
          <Every {...part} />
          {value.repeat === 'weekly' && <Weekdays {...part} />}
          {(value.repeat === 'monthly' || value.repeat === 'yearly') && <DayOfMonth {...part} />}
          <Stops {...part} />
        </>
      );
    default:
      return value.repeat satisfies never;
  }
}

const units = { daily: 'days', weekly: 'weeks', monthly: 'months', yearly: 'years' } as const;

function Every({ value, change, faults }: Part) {
  const unit = value.repeat in units ? units[value.repeat as keyof typeof units] : '';
  return (
    <TextField
      label={`Every how many ${unit}`}
      inputMode="numeric"
      autoComplete="off"
      className="max-w-48"
      value={value.every}
      error={faults.every}
      onChange={(event) => change({ every: event.target.value })}
    />
  );
}

function Weekdays({ value, change, faults }: Part) {
  const toggle = (day: Weekday, on: boolean) =>
    change({ weekdays: weekdays.filter((one) => (one === day ? on : value.weekdays.includes(one))) });
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1 text-[0.8125rem] font-semibold">On</legend>
      <div className="flex flex-wrap gap-1.5">
        {weekdays.map((day) => {
          const on = value.weekdays.includes(day);
          return (
            <label
              key={day}
              className={cx(
                'flex min-h-control min-w-11 items-center justify-center rounded border px-2 font-semibold',
                'has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-petrol',
                on ? 'border-ink bg-ink text-surface' : 'border-edge bg-surface text-ink hover:bg-paper',
              )}
            >
              <input
                type="checkbox"
                className="sr-only"
                aria-label={weekdayWord[day]}
                checked={on}
                onChange={(event) => toggle(day, event.target.checked)}
              />
              <span aria-hidden="true">{weekdayWord[day].slice(0, 3)}</span>
            </label>
          );
        })}
      </div>
      <FieldNotes id="weekdays" error={faults.weekdays} />
    </fieldset>
  );
}

function DayOfMonth({ value, change }: Part) {
  const byWeekday = value.monthBy === 'weekday';
  return (
    <div className="grid grid-cols-2 gap-3">
      <Select
        label="On"
        className={byWeekday ? 'col-span-2' : undefined}
        value={value.monthBy}
        onChange={(event) => change({ monthBy: event.target.value as RecurrenceForm['monthBy'] })}
      >
        <option value="day">the {ordinal(Number(value.day.slice(8, 10)) || 1)}, as the first day</option>
        <option value="weekday">a weekday by its place in the month</option>
        <option value="last-day">the last day of the month</option>
      </Select>
      {byWeekday && (
        <>
          <Select
            label="Which"
            value={value.rank}
            onChange={(event) => change({ rank: event.target.value as RecurrenceForm['rank'] })}
          >
            {ranks.map((rank) => (
              <option key={rank} value={rank}>
                {rankWord[rank]}
              </option>
            ))}
          </Select>
          <Select
            label="Weekday"
            value={value.rankDay}
            onChange={(event) => change({ rankDay: event.target.value as Weekday })}
          >
            {weekdays.map((day) => (
              <option key={day} value={day}>
                {weekdayWord[day]}
              </option>
            ))}
          </Select>
        </>
      )}
    </div>
  );
}

function Stops({ value, change, faults }: Part) {
  const { dayOf } = useFormats();
  return (
    <div className="grid grid-cols-2 gap-3">
      <Select
        label="Ends"
        value={value.stops}
        onChange={(event) => {
          const stops = event.target.value as RecurrenceForm['stops'];
          const year = dayOf(new Date()).slice(0, 4);
          change({ stops, ...(stops === 'on' && value.until === '' ? { until: `${year}-12-31` } : {}) });
        }}
      >
        <option value="never">never</option>
        <option value="on">on a day</option>
        <option value="after">after some times</option>
      </Select>
      {value.stops === 'on' && (
        <TextField
          label="Last day"
          type="date"
          value={value.until}
          error={faults.until}
          onChange={(event) => change({ until: event.target.value })}
        />
      )}
      {value.stops === 'after' && (
        <TextField
          label="Times"
          inputMode="numeric"
          autoComplete="off"
          value={value.count}
          error={faults.count}
          onChange={(event) => change({ count: event.target.value })}
        />
      )}
    </div>
  );
}
