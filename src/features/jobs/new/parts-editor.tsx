import { Plus, Trash2 } from 'lucide-react';
import { useFieldArray, useFormContext } from 'react-hook-form';
import type { Substrate } from '#contracts/common.ts';
import { Button } from '#src/ui/button.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import type { JobForm } from '../model/job-form.ts';
import { substrateWords } from '#src/lib/substrate-words.ts';

/** The parts, as the sheet proposes them, to be changed. Units are the room a part takes in a booth or on a rack. */
export function PartsEditor() {
  const { control, register, formState } = useFormContext<JobForm>();
  const { fields, append, remove } = useFieldArray({ control, name: 'parts' });
  const errors = formState.errors.parts;
  const all = errors?.message ?? errors?.root?.message;
  return (
    <fieldset className="flex min-w-0 flex-col gap-2">
      <legend className="mb-2 text-base font-bold">Parts</legend>
      {fields.map((field, i) => (
        <div
          key={field.id}
          className="grid grid-cols-[minmax(0,1fr)_4.5rem_auto] items-start gap-2 sm:grid-cols-[minmax(0,1fr)_11rem_4.5rem_auto]"
        >
          <TextField
            label={`Part ${i + 1}`}
            hideLabel
            placeholder="Part"
            className="max-sm:col-span-3"
            autoComplete="off"
            error={errors?.[i]?.name?.message}
            {...register(`parts.${i}.name`)}
          />
          <Select label={`Material of part ${i + 1}`} hideLabel {...register(`parts.${i}.substrate`)}>
            {(Object.keys(substrateWords) as Substrate[]).map((value) => (
              <option key={value} value={value}>
                {substrateWords[value]}
              </option>
            ))}
          </Select>
          <TextField
            label={`Units of room of part ${i + 1}`}
            hideLabel
            inputMode="numeric"
            error={errors?.[i]?.units?.message}
            {...register(`parts.${i}.units`)}
          />
          <IconButton
            label={`Take out part ${i + 1}`}
            icon={<Trash2 size={16} aria-hidden="true" />}
            onClick={() => remove(i)}
          />
        </div>
      ))}
      {all && <p className="text-xs font-semibold text-crimson">{all}</p>}
      <div className="flex flex-wrap items-center gap-x-3 gap-y-1">
        <Button
          size="small"
          icon={<Plus size={14} aria-hidden="true" />}
          disabled={fields.length >= 40}
          onClick={() => append({ name: '', substrate: 'steel', units: '1' })}
        >
          Add a part
        </Button>
        <p className="text-xs text-muted">The number is the room it takes, in units of the booth or rack.</p>
      </div>
    </fieldset>
  );
}
