import { Checkbox } from '#src/ui/checkbox.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { repeats, type Measure, type RecurrenceFaults, type RecurrenceForm, type Repeat } from './recurrence.ts';
import { toDay, toRepeat } from './recurrence-edits.ts';
import { RecurrenceDays } from './recurrence-days.tsx';
import { RecurrencePreview } from './recurrence-preview.tsx';

type RecurrenceEditorProps = {
  value: RecurrenceForm;
  onChange: (value: RecurrenceForm) => void;
  /** Asks for a length (`for 2 h`) or for an end (`until 17:00`). */
  measure: Measure;
  /** What is wrong, from `readRecurrence`; empty until somebody has tried to save. */
  faults?: RecurrenceFaults;
  /** Which kinds are on offer; the one it has is always among them. */
  offers?: readonly Repeat[];
  /** Whether whole days are on offer. */
  mayBeAllDay?: boolean;
};

const repeatWords: Record<Repeat, string> = {
  once: 'once',
  daily: 'every so many days',
  weekly: 'on days of the week',
  monthly: 'every so many months',
  yearly: 'every so many years',
  own: 'by a rule of its own',
};

/** When something happens, in everyday words, with what comes of it below: the sentence and the next dates. */
export function RecurrenceEditor(props: RecurrenceEditorProps) {
  const { value, onChange, measure, faults = {}, offers = repeats, mayBeAllDay = false } = props;
  const change = (more: Partial<RecurrenceForm>) => onChange({ ...value, ...more });
  const isOnce = value.repeat === 'once';
  return (
    <div className="flex flex-col gap-4">
      <Select
        label="Happens"
        value={value.repeat}
        onChange={(event) => onChange(toRepeat(value, event.target.value as Repeat))}
      >
        {repeats
          .filter((repeat) => offers.includes(repeat) || repeat === value.repeat)
          .map((repeat) => (
            <option key={repeat} value={repeat}>
              {repeatWords[repeat]}
            </option>
          ))}
      </Select>
      <div className="grid grid-cols-2 gap-3">
        <TextField
          label={isOnce ? 'Day' : 'From day'}
          type="date"
          value={value.day}
          error={faults.day}
          onChange={(event) => onChange(toDay(value, event.target.value))}
        />
        {!value.allDay && (
          <TextField
            label={isOnce ? 'Time' : 'At'}
            autoComplete="off"
            value={value.time}
            error={faults.time}
            onChange={(event) => change({ time: event.target.value })}
          />
        )}
        {value.allDay && (
          <TextField
            label="Days"
            inputMode="numeric"
            autoComplete="off"
            value={value.days}
            error={faults.days}
            onChange={(event) => change({ days: event.target.value })}
          />
        )}
        {!value.allDay && <Length {...{ value, change, measure, faults }} />}
      </div>
      {mayBeAllDay && (
        <Checkbox
          label="Whole days"
          checked={value.allDay}
          onChange={(event) => change({ allDay: event.target.checked })}
        />
      )}
      <RecurrenceDays {...{ value, change, faults }} />
      <RecurrencePreview value={value} measure={measure} />
    </div>
  );
}

type LengthProps = {
  value: RecurrenceForm;
  change: (more: Partial<RecurrenceForm>) => void;
  measure: Measure;
  faults: RecurrenceFaults;
};

function Length({ value, change, measure, faults }: LengthProps) {
  if (measure === 'length')
    return (
      <TextField
        label="For"
        hint="2 h, 90 min, 3 days"
        autoComplete="off"
        value={value.length}
        error={faults.length}
        onChange={(event) => change({ length: event.target.value })}
      />
    );
  return (
    <>
      {value.repeat === 'once' && (
        <TextField
          label="Until day"
          type="date"
          value={value.endDay}
          error={faults.endDay}
          onChange={(event) => change({ endDay: event.target.value })}
        />
      )}
      <TextField
        label="Until"
        autoComplete="off"
        value={value.end}
        error={faults.end}
        onChange={(event) => change({ end: event.target.value })}
      />
    </>
  );
}
