import { takeSheets, type FirstSteps } from '#contracts/first-steps.ts';
import { paths } from '#src/app/paths.ts';
import { useShop } from '#src/lib/session.ts';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { readWith, useTypedForm } from '../parts/use-typed-form.ts';
import { useTakeStep } from './first-steps-query.ts';
import { StepForm } from './step-form.tsx';

type Form = { sheets: string[] };

export function SheetsStep({ starter, onTaken }: { starter: FirstSteps['starter']; onTaken: () => void }) {
  const shop = useShop();
  const { form, change, faults, submit, drop } = useTypedForm<Form, Form>(
    `first-steps.sheets.${shop.id}`,
    { sheets: starter.map(({ key }) => key) },
    (typed) => readWith(takeSheets.body, typed),
  );
  const take = useTakeStep(takeSheets, () => {
    drop();
    onTaken();
  });
  const turn = (key: string, on: boolean) =>
    change({
      sheets: starter.flatMap((one) => ((one.key === key ? on : form.sheets.includes(one.key)) ? one.key : [])),
    });
  return (
    <StepForm
      busy={take.isPending}
      error={take.error}
      editors={[{ to: paths.sheets(), label: 'All process sheets' }]}
      onSend={() => submit((value) => take.mutate(value))}
    >
      <p className="rounded border border-line bg-paper px-3 py-2">
        These are common practice, with the data sheets of the coatings they name. Check every figure against your
        makers’ data sheets and your local code before you spray by it; each can be changed.
      </p>
      <fieldset className="flex flex-col gap-2">
        <legend className="mb-1 text-[0.8125rem] font-semibold">Process sheets to begin with</legend>
        {starter.map(({ key, name, summary }) => (
          <Checkbox
            key={key}
            label={name}
            hint={summary}
            checked={form.sheets.includes(key)}
            onChange={(event) => turn(key, event.target.checked)}
          />
        ))}
        {faults.sheets !== undefined && <p className="text-xs font-semibold text-crimson">Choose at least one.</p>}
      </fieldset>
    </StepForm>
  );
}
