import { useId } from 'react';
import { cx } from '#src/lib/cx.ts';
import { boxClasses } from './box-classes.ts';
import { FieldNotes } from './field-notes.tsx';
import { notesOf } from './notes-of.ts';

/** A day of the calendar and a time as typed; both may be empty. */
export type DateTimeText = { day: string; time: string };

type DateTimeFieldProps = {
  label: string;
  value: DateTimeText;
  onChange: (value: DateTimeText) => void;
  onBlur?: () => void;
  hint?: string;
  error?: string | undefined;
  optional?: boolean;
  className?: string;
};

/** A day and a time of day. The time is typed loosely: 9, 930, 14.15, 2 pm. */
export function DateTimeField({
  label,
  value,
  onChange,
  onBlur,
  hint,
  error,
  optional,
  className,
}: DateTimeFieldProps) {
  const id = useId();
  const described = notesOf(id, { hint, error });
  const both = {
    onBlur,
    className: boxClasses,
    'aria-invalid': error ? (true as const) : undefined,
    'aria-describedby': described || undefined,
  };
  return (
    <fieldset className={cx('flex min-w-0 flex-col gap-1', className)}>
      <legend className="mb-1 text-[0.8125rem] font-semibold">
        {label}
        {optional && <span className="font-normal text-muted"> (optional)</span>}
      </legend>
      <div className="grid grid-cols-[minmax(0,3fr)_minmax(0,2fr)] gap-2">
        <input
          {...both}
          type="date"
          aria-label={`${label}, day`}
          value={value.day}
          onChange={(event) => onChange({ ...value, day: event.target.value })}
        />
        <input
          {...both}
          type="text"
          inputMode="text"
          autoComplete="off"
          placeholder="time"
          aria-label={`${label}, time`}
          value={value.time}
          onChange={(event) => onChange({ ...value, time: event.target.value })}
        />
      </div>
      <FieldNotes id={id} hint={hint} error={error} />
    </fieldset>
  );
}
