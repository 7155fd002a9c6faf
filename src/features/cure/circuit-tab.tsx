import { useQuery } from '@tanstack/react-query';
import { useFormats, useShop } from '#src/lib/session.ts';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { Choice } from '#src/ui/choice.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Select } from '#src/ui/select.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { CircuitResult } from './circuit-result.tsx';
import { FieldGrid, NumberField, SelectField } from './desk-fields.tsx';
import { circuitsQuery } from './desk-queries.ts';
import { LampRows } from './lamp-rows.tsx';
import { circuitAnswer, type ShopCircuit } from './model/circuit.ts';
import { plainNumber } from './model/typed.ts';
import { Card, NotYet, Split } from './sections.tsx';
import { useDesk } from './use-desk.ts';

export function CircuitTab() {
  const { values, set } = useDesk();
  const { unit } = useFormats();
  const { data, error, isPending, refetch } = useQuery(circuitsQuery(useShop().id));
  const ofShop = values.lamps !== 'typed';
  const circuit = ofShop ? (data?.find(({ id }) => id === values.circuit) ?? data?.[0] ?? null) : null;
  const answer = !ofShop || circuit ? circuitAnswer(values, circuit, unit) : null;
  const errors = answer?.errors ?? {};
  return (
    <Split
      asked={
        <Card title="Lamps and circuit">
          <Choice
            label="Lamps"
            value={ofShop ? 'shop' : 'typed'}
            onChange={(lamps) => set({ lamps })}
            options={[
              { value: 'shop', label: 'Of the shop' },
              { value: 'typed', label: 'Typed' },
            ]}
          />
          {!ofShop && <LampRows errors={errors} />}
          {ofShop && isPending && <Skeleton className="h-control w-full rounded" />}
          {ofShop && error && (
            <ErrorNote
              error={error}
              what="The shop's lamps could not be loaded."
              kept="You can type lamps instead."
              retry={() => void refetch()}
            />
          )}
          {ofShop && data && <CircuitPicker circuits={data} chosen={circuit} />}
          <FieldGrid>
            <NumberField name="volts" label="Volts" errors={errors} />
            <SelectField
              name="phases"
              label="Phases"
              options={[
                ['3', 'Three'],
                ['1', 'One'],
              ]}
            />
            {!ofShop && <NumberField name="amps" label="Breaker, A" errors={errors} />}
            <NumberField name="hold" label="Burn for, min" hint="180 and more is continuous." errors={errors} />
          </FieldGrid>
          <Checkbox
            label="Keep to 80 % always"
            hint="Many shops do, also for short bakes."
            checked={values.eighty === 'yes'}
            onChange={(event) => set({ eighty: event.target.checked ? 'yes' : 'no' })}
          />
        </Card>
      }
      found={
        <Card title="Which run together">
          {answer?.ok && answer.value.lamps.length > 0 ? (
            <CircuitResult answer={answer.value} shop={circuit} />
          ) : answer?.ok || (ofShop && data) ? (
            <NotYet>No lamp hangs on this circuit. Add one, or choose another circuit.</NotYet>
          ) : (
            <NotYet />
          )}
        </Card>
      }
    />
  );
}

function CircuitPicker({ circuits, chosen }: { circuits: readonly ShopCircuit[]; chosen: ShopCircuit | null }) {
  const { set } = useDesk();
  if (circuits.length === 0) return <p className="text-muted">The shop has no circuits yet. Type lamps instead.</p>;
  return (
    <Select label="Circuit" value={chosen?.id} onChange={(event) => set({ circuit: event.target.value })}>
      {circuits.map(({ id, name, kilowatts }) => (
        <option key={id} value={id}>
          {name}, {plainNumber(kilowatts, 1)} kW
        </option>
      ))}
    </Select>
  );
}
