import { Controller, useFormContext } from 'react-hook-form';
import type { SheetBody } from '#contracts/sheets.ts';
import { Checkbox } from '#src/ui/checkbox.tsx';
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
            {options.map(({ key, label }) => (
              <Checkbox
                key={key}
                label={label}
                checked={value.includes(key)}
                onChange={(event) => onChange(event.target.checked ? [...value, key] : value.filter((k) => k !== key))}
              />
            ))}
          </div>
          {error?.message && <p className="mt-1 text-xs font-semibold text-crimson">{error.message}</p>}
        </fieldset>
      )}
    />
  );
}
