import { Pencil } from 'lucide-react';
import { useState } from 'react';
import type { Job } from '#contracts/jobs.ts';
import { IconButton } from '#src/ui/icon-button.tsx';
import { SideCard } from './side-card.tsx';
import { TextEditor } from './text-editor.tsx';

type TextCardProps = { job: Job; field: 'notes' | 'colourNote'; title: string; editable: boolean };

export function TextCard({ job, field, title, editable }: TextCardProps) {
  const [isOpen, setOpen] = useState(false);
  const edit = editable && !isOpen && (
    <IconButton
      size="small"
      label={`Edit ${title.toLowerCase()}`}
      icon={<Pencil size={15} aria-hidden="true" />}
      onClick={() => setOpen(true)}
    />
  );
  return (
    <SideCard title={title} action={edit}>
      {isOpen ? (
        <TextEditor job={job} field={field} label={title} onDone={() => setOpen(false)} />
      ) : (
        <p className={job[field] ? 'whitespace-pre-wrap wrap-anywhere' : 'text-muted'}>
          {job[field] || 'Nothing yet.'}
        </p>
      )}
    </SideCard>
  );
}
