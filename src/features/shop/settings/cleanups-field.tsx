import { Plus, Trash2 } from 'lucide-react';
import { useId } from 'react';
import { Button } from '#src/ui/button.tsx';
import { FieldNotes } from '#src/ui/field-notes.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { boxClasses } from '#src/ui/box-classes.ts';
import { Field } from '#src/ui/field.tsx';
import type { CleanupForm } from './model/shop-form.ts';

type CleanupsFieldProps = {
  rows: readonly CleanupForm[];
  families: readonly string[];
  error?: string | undefined;
  onChange: (rows: CleanupForm[]) => void;
};

/** Minutes of cleaning when one kind of work follows another in the same place. */
export function CleanupsField({ rows, families, error, onChange }: CleanupsFieldProps) {
  const listId = useId();
  const change = (at: number, more: Partial<CleanupForm>) =>
    onChange(rows.map((row, i) => (i === at ? { ...row, ...more } : row)));
  return (
    <div className="flex flex-col gap-3">
      <p className="text-muted">
        {families.length === 0
          ? 'Process sheets name the kind of work of each way; none does so far.'
          : `Process sheets name ${families.join(', ')}.`}{' '}
        What is not listed needs no cleaning.
      </p>
      {rows.map((row, i) => (
        <div key={i} className="grid grid-cols-[1fr_1fr_5rem_auto] items-end gap-2">
          <Family
            label="After"
            listId={listId}
            value={row.from}
            onChange={(from) => change(i, { from })}
            hidden={i > 0}
          />
          <Family label="Before" listId={listId} value={row.to} onChange={(to) => change(i, { to })} hidden={i > 0} />
          <TextField
            label="Minutes"
            hideLabel={i > 0}
            inputMode="numeric"
            autoComplete="off"
            value={row.minutes}
            onChange={(event) => change(i, { minutes: event.target.value })}
          />
          <IconButton
            label={`Remove the line of ${row.from || 'nothing'} and ${row.to || 'nothing'}`}
            icon={<Trash2 size={16} aria-hidden="true" />}
            onClick={() => onChange(rows.filter((_, at) => at !== i))}
          />
        </div>
      ))}
      <datalist id={listId}>
        {families.map((family) => (
          <option key={family} value={family} />
        ))}
      </datalist>
      <FieldNotes id={`${listId}-note`} error={error} />
      <Button
        size="small"
        className="self-start"
        icon={<Plus size={16} aria-hidden="true" />}
        onClick={() => onChange([...rows, { from: families[0] ?? '', to: families[1] ?? '', minutes: '10' }])}
      >
        Add a line
      </Button>
    </div>
  );
}

type FamilyProps = {
  label: string;
  listId: string;
  value: string;
  hidden: boolean;
  onChange: (family: string) => void;
};

const Family = ({ label, listId, value, hidden, onChange }: FamilyProps) => (
  <Field label={label} hideLabel={hidden}>
    {(ids) => (
      <input
        {...ids}
        type="text"
        list={listId}
        autoComplete="off"
        className={boxClasses}
        value={value}
        onChange={(event) => onChange(event.target.value)}
      />
    )}
  </Field>
);
