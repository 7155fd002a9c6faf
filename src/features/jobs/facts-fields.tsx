import { Controller, useFormContext, useWatch } from 'react-hook-form';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { Choice } from '#src/ui/choice.tsx';
import { DateTimeField } from '#src/ui/date-time-field.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { HeatFields } from './heat-fields.tsx';
import type { JobFacts } from './model/job-facts.ts';
import { weightOf, weights } from './model/weights.ts';

/** Title, vehicle, arrival, promise, weight, battery: the same when a job is made and when it is changed. */
export function FactsFields() {
  const { register, control, formState } = useFormContext<JobFacts>();
  const { errors } = formState;
  const electric = useWatch({ control, name: 'electric' });
  return (
    <div className="grid gap-x-4 gap-y-3.5 sm:grid-cols-2">
      <TextField
        label="Title"
        autoComplete="off"
        placeholder="Tailgate, electric"
        error={errors.title?.message}
        {...register('title')}
      />
      <TextField
        label="Vehicle"
        optional
        autoComplete="off"
        placeholder="Kind, colour, plate"
        error={errors.vehicle?.message}
        {...register('vehicle')}
      />
      <When name="release" label="Arrives" hint="From then on it can be planned." />
      <When
        name="promise"
        label="Promise"
        optional
        hint="What was said to the customer. Without a time: end of the afternoon."
      />
      <Weight />
      <div className="flex flex-col gap-2 sm:col-span-2">
        <Checkbox
          label="High-voltage battery on board"
          hint="Electric or hybrid: heat is held to the limit of the vehicle."
          {...register('electric')}
        />
        {electric && <HeatFields />}
      </div>
    </div>
  );
}

type WhenProps = { name: 'release' | 'promise'; label: string; hint: string; optional?: boolean };

function When({ name, ...field }: WhenProps) {
  const { control, formState } = useFormContext<JobFacts>();
  // A fault of a day with its time lies at both together; react-hook-form types it as if each had its own.
  const error = formState.errors[name] as { message?: string } | undefined;
  return (
    <Controller
      control={control}
      name={name}
      render={({ field: { value, onChange, onBlur } }) => (
        <DateTimeField {...field} value={value} onChange={onChange} onBlur={onBlur} error={error?.message} />
      )}
    />
  );
}

function Weight() {
  const { control } = useFormContext<JobFacts>();
  return (
    <Controller
      control={control}
      name="weight"
      render={({ field: { value, onChange } }) => {
        const chosen = weightOf(value);
        return (
          <div className="flex flex-col gap-1 sm:col-span-2">
            <Choice
              label="Weight of the promise"
              value={String(chosen.value)}
              onChange={(next) => onChange(Number(next))}
              options={weights.map((weight) => ({ value: String(weight.value), label: weight.word }))}
            />
            <p className="text-xs text-muted" role="status">
              {chosen.hint}.
            </p>
          </div>
        );
      }}
    />
  );
}
