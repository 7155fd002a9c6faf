import type { ReactNode } from 'react';
import { useFormats } from '#src/lib/session.ts';
import { TextField } from '#src/ui/text-field.tsx';
import type { SheetForm } from '../model/sheet-form.ts';

/** What every field of the sheet needs: the form, what is wrong in it, and how to change it. */
export type FormParts = {
  form: SheetForm;
  faults: Partial<Record<keyof SheetForm, string>>;
  change: (more: Partial<SheetForm>) => void;
};
type FieldProps = FormParts & { name: keyof SheetForm; label: string; hint?: ReactNode; optional?: boolean };

export const WordsField = ({ form, faults, change, name, label, hint, optional }: FieldProps) => (
  <TextField
    label={label}
    hint={hint}
    optional={optional ?? false}
    autoComplete="off"
    error={faults[name]}
    value={form[name]}
    onChange={(event) => change({ [name]: event.target.value })}
  />
);

/** A number, or a time typed loosely. */
export const FigureField = ({ form, faults, change, name, label, hint, optional }: FieldProps) => (
  <TextField
    label={label}
    hint={hint}
    optional={optional ?? false}
    autoComplete="off"
    className="max-w-56"
    error={faults[name]}
    value={form[name]}
    onChange={(event) => change({ [name]: event.target.value })}
  />
);

/** A temperature in the reader's unit. */
export function DegreesField({ label, ...field }: FieldProps) {
  const { unit } = useFormats();
  return <FigureField {...field} label={`${label}, °${unit}`} />;
}

/** A part of the sheet as its maker would head it. */
export const Section = ({ title, about, children }: { title: string; about?: ReactNode; children: ReactNode }) => (
  <section aria-label={title} className="card flex flex-col gap-3 p-4">
    <header>
      <h2 className="text-base font-bold">{title}</h2>
      {about && <p className="text-[0.8125rem] text-muted">{about}</p>}
    </header>
    {children}
  </section>
);

export const Row = ({ children }: { children: ReactNode }) => (
  <div className="grid grid-cols-1 gap-x-4 gap-y-3 min-[30rem]:grid-cols-2 xl:grid-cols-3">{children}</div>
);
