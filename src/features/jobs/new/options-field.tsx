import { Controller, useFormContext } from 'react-hook-form';
import type { SheetBody } from '#contracts/sheets.ts';
import { timesChosen } from '#server/sheets/options.ts';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { Select } from '#src/ui/select.tsx';
import type { JobForm } from '../model/job-form.ts';

/** What the sheet leaves open. Each choice shows in the stages at once. */
export function OptionsField({ options }: { options: SheetBody['options'] }) {
  const { control, formState } = useFormContext<JobForm>();
  const error = formState.errors.options as { message?: string } | undefined;
  if (options.length === 0) return null;
  return (
    <Controller
      control={control}
      name="options"
      render={({ field: { value, onChange } }) => (
        <fieldset className="min-w-0">
          <legend className="mb-2 text-base font-bold">Options</legend>
          <div className="grid gap-x-4 gap-y-1 sm:grid-cols-2">
            {options.map(({ key, label, most = 1 }) =>
              most === 1 ? (
                <Checkbox
                  key={key}
                  label={label}
                  checked={value.includes(key)}
                  onChange={({ target }) => onChange(chosenTimes(value, key, target.checked ? 1 : 0))}
                />
              ) : (
                <Times
                  key={key}
                  label={label}
                  most={most}
                  value={timesChosen(value, key)}
                  onChange={(times) => onChange(chosenTimes(value, key, times))}
                />
              ),
            )}
          </div>
          {error?.message && <p className="mt-1 text-xs font-semibold text-crimson">{error.message}</p>}
        </fieldset>
      )}
    />
  );
}

/** The options with one of them chosen so many times: its key stands in them that often. */
const chosenTimes = (chosen: readonly string[], key: string, times: number): string[] => [
  ...chosen.filter((one) => one !== key),
  ...Array.from({ length: times }, () => key),
];

type TimesProps = { label: string; most: number; value: number; onChange: (times: number) => void };

/** How often: of extra coats. */
function Times({ label, most, value, onChange }: TimesProps) {
  return (
    <div className="flex items-center gap-2.5">
      <Select
        label={label}
        hideLabel
        className="w-24"
        value={String(value)}
        onChange={({ target }) => onChange(Number(target.value))}
      >
        {Array.from({ length: most + 1 }, (_, n) => (
          <option key={n} value={n}>
            {n === 0 ? 'none' : n}
          </option>
        ))}
      </Select>
      <span aria-hidden="true">{label}</span>
    </div>
  );
}
