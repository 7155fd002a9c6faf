import { useId, type ReactNode } from 'react';
import { cx } from '#src/lib/cx.ts';
import { FieldNotes } from './field-notes.tsx';
import { notesOf } from './notes-of.ts';

/** What the control inside has to carry, so that label, hint and error are read out with it. */
export type FieldIds = { id: string; 'aria-describedby'?: string; 'aria-invalid'?: true; required?: true };

export type FieldProps = {
  label: string;
  hint?: ReactNode;
  /** What is wrong and how it would be right; absent or empty: nothing is. */
  error?: string | undefined;
  /** Marks what may be left empty; most fields are needed. */
  optional?: boolean;
  /** The label is only read out. */
  hideLabel?: boolean;
  className?: string | undefined;
};

export function Field({
  label,
  hint,
  error,
  optional,
  hideLabel,
  className,
  children,
}: FieldProps & { children: (ids: FieldIds) => ReactNode }) {
  const id = useId();
  const described = notesOf(id, { hint, error });
  return (
    <div className={cx('flex min-w-0 flex-col gap-1', className)}>
      <label htmlFor={id} className={hideLabel ? 'sr-only' : 'text-[0.8125rem] font-semibold'}>
        {label}
        {optional && <span className="font-normal text-muted"> (optional)</span>}
      </label>
      {children({
        id,
        ...(described ? { 'aria-describedby': described } : {}),
        ...(error ? { 'aria-invalid': true } : {}),
      })}
      <FieldNotes id={id} hint={hint} error={error} />
    </div>
  );
}
