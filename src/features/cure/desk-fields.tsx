import type { ReactNode } from 'react';
import { useFormats } from '#src/lib/session.ts';
import { Select } from '#src/ui/select.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import type { FieldKey } from './model/desk-state.ts';
import type { Errors } from './model/reader.ts';
import { shownIn, temperatureToken } from './model/typed.ts';
import { useDesk } from './use-desk.ts';

type FieldProps = {
  name: FieldKey;
  label: string;
  errors: Errors;
  hint?: ReactNode;
  optional?: boolean;
  placeholder?: string;
};

const typing = { inputMode: 'decimal', autoComplete: 'off', spellCheck: false, maxLength: 20 } as const;

/** A number of the desk; its unit belongs to the label. */
export function NumberField({ name, errors, ...field }: FieldProps) {
  const { values, set } = useDesk();
  return (
    <TextField
      {...field}
      {...typing}
      error={errors[name]}
      value={values[name]}
      onChange={(event) => set({ [name]: event.target.value })}
    />
  );
}

/** A temperature of the desk, typed in the reader's unit, which is put behind the label. */
export function TemperatureField({ name, label, errors, ...field }: FieldProps) {
  const { values, set } = useDesk();
  const { unit } = useFormats();
  return (
    <TextField
      {...field}
      {...typing}
      label={`${label}, °${unit}`}
      error={errors[name]}
      value={shownIn(values[name], unit)}
      onChange={(event) => set({ [name]: temperatureToken(event.target.value, unit) })}
    />
  );
}

type SelectFieldProps = {
  name: FieldKey;
  label: string;
  hint?: ReactNode;
  options: readonly (readonly [value: string, label: string])[];
};

export function SelectField({ name, options, ...field }: SelectFieldProps) {
  const { values, set } = useDesk();
  return (
    <Select {...field} value={values[name]} onChange={(event) => set({ [name]: event.target.value })}>
      {options.map(([value, label]) => (
        <option key={value} value={value}>
          {label}
        </option>
      ))}
    </Select>
  );
}

/** Fields in two columns, one below the other where there is no room. */
export const FieldGrid = ({ children }: { children: ReactNode }) => (
  <div className="grid grid-cols-1 items-start gap-3 min-[24rem]:grid-cols-2">{children}</div>
);
