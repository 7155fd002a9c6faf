import { purgeBeforeHeat } from '#chemistry/purge/purge-minutes.ts';
import { takePlaces, type PlacesStep as Taken } from '#contracts/first-steps.ts';
import { paths } from '#src/app/paths.ts';
import { useShop } from '#src/lib/session.ts';
import { TextField } from '#src/ui/text-field.tsx';
import { readWith, useTypedForm } from '../parts/use-typed-form.ts';
import { useTakeStep } from './first-steps-query.ts';
import { numberOf, sayFault } from './numbers.ts';
import { StepForm } from './step-form.tsx';

type Form = Record<keyof Taken, string>;
/** A usual drive-in booth; an empty air flow is one that nobody has measured. */
const usual: Form = {
  booths: '1',
  volumeM3: '96',
  airFlowM3PerHour: '20000',
  bakeLimitCelsius: '80',
  clearanceMinutes: '5',
  stations: '3',
  lamps: '2',
  lampKilowatts: '6',
  circuitKilowatts: '11',
};

const numbersOf = (form: Form) => ({
  booths: numberOf(form.booths),
  volumeM3: numberOf(form.volumeM3),
  airFlowM3PerHour: form.airFlowM3PerHour.trim() === '' ? null : numberOf(form.airFlowM3PerHour),
  bakeLimitCelsius: numberOf(form.bakeLimitCelsius),
  clearanceMinutes: numberOf(form.clearanceMinutes),
  stations: numberOf(form.stations),
  lamps: numberOf(form.lamps),
  lampKilowatts: numberOf(form.lampKilowatts),
  circuitKilowatts: numberOf(form.circuitKilowatts),
});

const fields: { title: string; rows: { key: keyof Form; label: string; hint?: string }[] }[] = [
  {
    title: 'Booths',
    rows: [
      { key: 'booths', label: 'Spray booths' },
      { key: 'volumeM3', label: 'Volume of one (m³)' },
      { key: 'airFlowM3PerHour', label: 'Air flow (m³/h)', hint: 'Empty if not known: no heat is planned then.' },
      { key: 'bakeLimitCelsius', label: 'Highest bake air (°C)', hint: 'As its maker and your code allow.' },
      { key: 'clearanceMinutes', label: 'Clearance time (min)', hint: 'Measured; until then nobody enters unmasked.' },
    ],
  },
  {
    title: 'Stations and lamps',
    rows: [
      { key: 'stations', label: 'Prep stations', hint: 'In one bay; air of their own is set on their page.' },
      { key: 'lamps', label: 'Cure lamps', hint: '0 for none.' },
      { key: 'lampKilowatts', label: 'Power of one (kW)' },
      { key: 'circuitKilowatts', label: 'Their circuit bears (kW)', hint: 'As your electrician says.' },
    ],
  },
];

export function PlacesStep({ onTaken }: { onTaken: () => void }) {
  const shop = useShop();
  const { form, change, faults, submit, drop } = useTypedForm<Form, Taken>(
    `first-steps.places.${shop.id}`,
    usual,
    (typed) => readWith<Form, typeof takePlaces.body>(takePlaces.body, numbersOf(typed) as unknown as Form),
  );
  const take = useTakeStep(takePlaces, () => {
    drop();
    onTaken();
  });
  return (
    <StepForm
      busy={take.isPending}
      error={take.error}
      editors={[
        { to: paths.places(), label: 'All booths and stations' },
        { to: paths.lamps(), label: 'All lamps and circuits' },
      ]}
      onSend={() => submit((value) => take.mutate(value))}
    >
      {fields.map(({ title, rows }) => (
        <fieldset key={title} className="flex flex-col gap-2">
          <legend className="mb-1 font-semibold">{title}</legend>
          <div className="grid grid-cols-2 items-start gap-x-3 gap-y-3 md:grid-cols-3">
            {rows.map(({ key, label, hint }) => (
              <TextField
                key={key}
                label={label}
                inputMode="decimal"
                autoComplete="off"
                hint={hint}
                error={faults[key] === undefined ? undefined : (sayFault(faults[key]) ?? '')}
                value={form[key]}
                onChange={(event) => change({ [key]: event.target.value })}
              />
            ))}
          </div>
        </fieldset>
      ))}
      <PurgeNote form={form} />
    </StepForm>
  );
}

/** What follows for every bake, from International Fire Code 2018, ch. 24. */
function PurgeNote({ form }: { form: Form }) {
  const { volumeM3, airFlowM3PerHour } = numbersOf(form);
  if (!(volumeM3 > 0) || (airFlowM3PerHour !== null && !(airFlowM3PerHour >= 0))) return null;
  const purge = purgeBeforeHeat({ cubicMetres: volumeM3, cubicMetresPerHour: airFlowM3PerHour });
  return (
    <p className="text-muted">
      {purge.heat === 'after-purge'
        ? `Purge before each bake: ${purge.wholeMinutes} min (four changes of the booth’s air, at least 3 min). Your local code comes first.`
        : 'Without a known air flow the booth sprays and air-dries; no bake is planned in it.'}
    </p>
  );
}
