import { useState } from 'react';
import type { Job } from '#contracts/jobs.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextArea } from '#src/ui/text-field.tsx';
import { useJobEdit } from '../data/use-job-edit.ts';
import { ChangedMeanwhile } from './changed-meanwhile.tsx';

type TextEditorProps = { job: Job; field: 'notes' | 'colourNote'; label: string; onDone: () => void };

/** Notes and the colour note, edited where they stand. */
export function TextEditor({ job, field, label, onDone }: TextEditorProps) {
  const edit = useJobEdit(job);
  const [text, setText] = useState(edit.base[field]);
  const fields = text === edit.base[field] ? {} : { [field]: text };
  return (
    <form
      className="flex flex-col gap-2.5"
      onSubmit={(event) => {
        event.preventDefault();
        edit.save(fields, onDone);
      }}
      onKeyDown={(event) => {
        if (event.key === 'Escape') onDone();
        if (event.key === 'Enter' && (event.ctrlKey || event.metaKey)) edit.save(fields, onDone);
      }}
    >
      <TextArea
        label={label}
        hideLabel
        rows={field === 'notes' ? 5 : 3}
        maxLength={4000}
        autoFocus
        value={text}
        onChange={(event) => setText(event.target.value)}
      />
      <ChangedMeanwhile edit={edit} onTakeTheirs={onDone} onSaveOver={() => edit.saveOver(fields, onDone)} />
      {edit.error && <ErrorNote error={edit.error} what="Not saved." kept="What you typed is still here." />}
      {edit.theirs.length === 0 && (
        <div className="flex gap-2">
          <Button type="submit" look="primary" size="small" busy={edit.busy}>
            Save
          </Button>
          <Button size="small" look="quiet" onClick={onDone}>
            Cancel
          </Button>
        </div>
      )}
    </form>
  );
}
