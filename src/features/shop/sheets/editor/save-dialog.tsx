import { useState } from 'react';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextArea } from '#src/ui/text-field.tsx';
import { noteOf, type Change } from '../model/changes.ts';
import { ChangesTable } from './changes-table.tsx';

type SaveDialogProps = {
  version: number;
  changes: readonly Change[];
  openJobs: number;
  warnings: number;
  busy: boolean;
  error: unknown;
  onSave: (note: string) => void;
  onClose: () => void;
};

/** What changes, in the words that will stand beside the version, before it is posted. */
export function SaveDialog({ version, changes, openJobs, warnings, busy, error, onSave, onClose }: SaveDialogProps) {
  const [note, setNote] = useState(() => (version === 1 ? '' : noteOf(changes)));
  const deed = `Save as version ${version}`;
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={deed}
      shape="wide"
      about={version === 1 ? 'Jobs can be made from it at once.' : `New jobs are made from it. ${keptBy(openJobs)}`}
      actions={
        <>
          <Button onClick={onClose}>Not yet</Button>
          <Button look="primary" busy={busy} onClick={() => onSave(note.trim())}>
            {deed}
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-3">
        {warnings > 0 && (
          <p className="rounded border border-amber bg-amber-soft px-3.5 py-2">
            {warnings === 1 ? 'One point is' : `${warnings} points are`} still to be looked at. It can be saved as it
            is.
          </p>
        )}
        <TextArea
          label="What changed"
          optional
          rows={2}
          maxLength={400}
          value={note}
          onChange={({ target }) => setNote(target.value)}
        />
        {version > 1 && (
          <ChangesTable label="Changes" changes={changes} before={`Version ${version - 1}`} after="Now" />
        )}
        {error != null && <ErrorNote error={error} what="It was not saved." kept="What you have changed is kept." />}
      </div>
    </Dialog>
  );
}

const keptBy = (openJobs: number): string =>
  openJobs === 0
    ? 'No open job is made from this sheet.'
    : openJobs === 1
      ? '1 open job keeps the version it was made with.'
      : `${openJobs} open jobs keep the version they were made with.`;
