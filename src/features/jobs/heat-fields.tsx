import { useFormContext } from 'react-hook-form';
import { useFormats } from '#src/lib/session.ts';
import { TextField } from '#src/ui/text-field.tsx';
import { HeatCaution } from './heat-caution.tsx';
import type { JobFacts } from './model/job-facts.ts';
import { assumedLimit } from './model/assumed-limit.ts';

/** What the vehicle's maker allows, in the reader's unit. */
export function HeatFields() {
  const { register, formState } = useFormContext<JobFacts>();
  const { unit, temperature } = useFormats();
  const assumed = `Left empty: ${temperature(assumedLimit.celsius, 'limit')} and ${assumedLimit.minutes} min are assumed.`;
  return (
    <div className="flex flex-col gap-3 rounded border border-line p-3">
      <div className="grid gap-x-4 gap-y-3 sm:grid-cols-2">
        <TextField
          label={`Heat limit of the vehicle, °${unit}`}
          optional
          inputMode="decimal"
          hint={assumed}
          error={formState.errors.heatLimit?.message}
          {...register('heatLimit')}
        />
        <TextField
          label="Minutes at that limit"
          optional
          inputMode="numeric"
          hint="Counted over all bakes together."
          error={formState.errors.heatMinutes?.message}
          {...register('heatMinutes')}
        />
      </div>
      <HeatCaution />
    </div>
  );
}
