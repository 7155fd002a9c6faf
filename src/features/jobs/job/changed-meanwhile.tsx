import { Button } from '#src/ui/button.tsx';
import type { JobEdit } from '../data/use-job-edit.ts';

type ChangedMeanwhileProps = { edit: JobEdit; onSaveOver: () => void; onTakeTheirs: () => void };

/** Somebody else was here: what they changed, and the choice between theirs and one's own. */
export function ChangedMeanwhile({ edit, onSaveOver, onTakeTheirs }: ChangedMeanwhileProps) {
  const { theirs, by, busy } = edit;
  if (theirs.length === 0) return null;
  return (
    <div role="alert" className="flex flex-col gap-2 rounded border border-amber bg-amber-soft px-3.5 py-3">
      <p className="font-semibold">
        {by ?? 'Somebody else'} changed this job while you were typing. Yours is not saved.
      </p>
      <ul className="flex list-disc flex-col gap-0.5 pl-4.5">
        {theirs.map(({ field, label, from, to }) => (
          <li key={field}>
            {label}: from {from} to {to}
          </li>
        ))}
      </ul>
      <p className="text-muted">
        Saving yours writes only the fields that you changed; the others stay as they are now.
      </p>
      <div className="flex flex-wrap gap-2">
        <Button onClick={onTakeTheirs} disabled={busy}>
          Drop mine
        </Button>
        <Button look="primary" onClick={onSaveOver} busy={busy}>
          Save mine as well
        </Button>
      </div>
    </div>
  );
}
