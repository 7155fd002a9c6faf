import type { Zone } from '#contracts/places.ts';
import { useFormats } from '#src/lib/session.ts';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { Choice } from '#src/ui/choice.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import type { Faults } from '../parts/use-typed-form.ts';
import { FaceHelper } from './face-helper.tsx';
import type { PlaceForm } from './model/place-form.ts';
import { PurgeNote } from './purge-note.tsx';

type PlaceFieldsProps = {
  form: PlaceForm;
  change: (more: Partial<PlaceForm>) => void;
  faults: Faults<PlaceForm>;
  zones: readonly Zone[];
};

const kinds = [
  { value: 'booth', label: 'Booth' },
  { value: 'prep', label: 'Prep station' },
  { value: 'rack', label: 'Rack' },
] as const;

export function PlaceFieldSet({ form, change, faults, zones }: PlaceFieldsProps) {
  const isRack = form.kind === 'rack';
  return (
    <>
      <Choice label="Kind" options={kinds} value={form.kind} onChange={(kind) => change({ kind })} />
      <TextField
        label="Name"
        autoComplete="off"
        error={faults.name}
        value={form.name}
        onChange={(event) => change({ name: event.target.value })}
      />
      <TextField
        label="Room, in units"
        hint="As parts are counted on jobs: a bumper 1, a door 2, a side 4 (common practice)."
        inputMode="numeric"
        autoComplete="off"
        error={faults.units}
        value={form.units}
        onChange={(event) => change({ units: event.target.value })}
      />
      {!isRack && (
        <Select
          label="Zone"
          optional
          hint="Places in one zone share their air: while one is sprayed in, no lamp burns in the others."
          error={faults.zoneId}
          value={form.zoneId}
          onChange={(event) => change({ zoneId: event.target.value })}
        >
          <option value="">air of its own</option>
          {zones.map((zone) => (
            <option key={zone.id} value={zone.id}>
              {zone.name}
            </option>
          ))}
        </Select>
      )}
      {form.kind === 'booth' && <Bakes {...{ form, change, faults }} />}
      {!isRack && <Air {...{ form, change, faults }} />}
    </>
  );
}

type Part = Omit<PlaceFieldsProps, 'zones'>;

function Bakes({ form, change, faults }: Part) {
  const { unit } = useFormats();
  return (
    <>
      <Checkbox
        label="Bakes"
        hint="Its air can be heated for a bake. A booth that bakes does not spray meanwhile."
        checked={form.bakes}
        onChange={(event) => change({ bakes: event.target.checked })}
      />
      {form.bakes && (
        <TextField
          label={`Highest air temperature, °${unit}`}
          optional
          hint={
            unit === 'C'
              ? 'From its plate. Empty counts as 93 °C (International Fire Code 2018); combined booths in Europe 100 °C (EN 16985).'
              : 'From its plate. Empty counts as 200 °F (International Fire Code 2018); combined booths in Europe 212 °F (EN 16985).'
          }
          inputMode="decimal"
          autoComplete="off"
          error={faults.bakeLimit}
          value={form.bakeLimit}
          onChange={(event) => change({ bakeLimit: event.target.value })}
        />
      )}
    </>
  );
}

function Air({ form, change, faults }: Part) {
  return (
    <fieldset className="flex min-w-0 flex-col gap-4">
      <legend className="mb-2 font-bold">Air</legend>
      <div className="grid grid-cols-2 gap-3">
        <TextField
          label="Volume"
          optional
          hint="m³, or 3024 ft3"
          autoComplete="off"
          error={faults.volume}
          value={form.volume}
          onChange={(event) => change({ volume: event.target.value })}
        />
        <TextField
          label="Air flow"
          optional
          hint="m³/h, or 12000 cfm"
          autoComplete="off"
          error={faults.airFlow}
          value={form.airFlow}
          onChange={(event) => change({ airFlow: event.target.value })}
        />
      </div>
      <PurgeNote form={form} />
      {form.airFlow.trim() === '' && <FaceHelper onUse={(flow) => change({ airFlow: String(flow) })} />}
      <TextField
        label="Clearance, minutes"
        optional
        hint="Measured: until nobody needs air-fed breathing equipment after spraying. Not measured: 5 min in a booth, 30 in an open workshop (HSE, UK)."
        inputMode="numeric"
        autoComplete="off"
        error={faults.clearance}
        value={form.clearance}
        onChange={(event) => change({ clearance: event.target.value })}
      />
    </fieldset>
  );
}
