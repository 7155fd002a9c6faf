import { CircleAlert } from 'lucide-react';
import type { ReactNode } from 'react';

export type Notes = { hint?: ReactNode; error?: string | undefined };

/** Hint and error below a control; `id` is the control's. */
export function FieldNotes({ id, hint, error }: Notes & { id: string }) {
  return (
    <>
      {hint && (
        <p id={`${id}-hint`} className="text-xs text-muted">
          {hint}
        </p>
      )}
      {error && (
        <p id={`${id}-error`} className="flex items-start gap-1.5 text-xs font-semibold text-crimson">
          <CircleAlert size={14} className="mt-px shrink-0" aria-hidden="true" />
          {error}
        </p>
      )}
    </>
  );
}
