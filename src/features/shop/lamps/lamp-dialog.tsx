import { useId } from 'react';
import type { Clash } from '#contracts/clashes.ts';
import { changeLamp, createLamp, type Circuit, type Lamp, type LampFields } from '#contracts/lamps.ts';
import { ApiError, isApiError } from '#src/lib/api-error.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Choice } from '#src/ui/choice.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Select } from '#src/ui/select.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { ChangedMeanwhile } from '../parts/changed-meanwhile.tsx';
import { useBase, useSetUpWrite } from '../parts/use-set-up-write.ts';
import { faultsOf, useTypedForm } from '../parts/use-typed-form.ts';
import { lampForm, newLamp, readLampForm, type LampForm } from './model/circuit-form.ts';

type LampDialogProps = {
  /** Null: a new one. */
  lamp: Lamp | null;
  circuits: readonly Circuit[];
  onClose: () => void;
  onSaved: (name: string, clashes: Clash[]) => void;
};

const waves = [
  { value: 'short', label: 'Short wave' },
  { value: 'medium', label: 'Medium wave' },
] as const;

export function LampDialog({ lamp, circuits, onClose, onSaved }: LampDialogProps) {
  const { typed, base, send, error, busy } = useLampForm({ lamp, circuits, onClose, onSaved });
  const { form, change, faults } = typed;
  const formId = useId();
  const isStale = isApiError(error, 'stale');
  const leave = () => {
    typed.drop();
    onClose();
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && leave()}
      title={lamp ? lamp.name : 'A new lamp'}
      about="A cure lamp that stands in front of a part."
      actions={
        <>
          <Button onClick={leave}>Leave it</Button>
          <Button type="submit" form={formId} look="primary" busy={busy}>
            {lamp ? 'Save' : 'Add it'}
          </Button>
        </>
      }
    >
      <form
        id={formId}
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => {
          event.preventDefault();
          typed.submit(send);
        }}
      >
        <TextField
          label="Name"
          autoComplete="off"
          error={faults.name}
          value={form.name}
          onChange={(event) => change({ name: event.target.value })}
        />
        <TextField
          label="Power, kW"
          inputMode="decimal"
          autoComplete="off"
          hint="All its heads together, from its plate."
          error={faults.kilowatts}
          value={form.kilowatts}
          onChange={(event) => change({ kilowatts: event.target.value })}
        />
        <Select
          label="Circuit"
          error={faults.circuitId}
          value={form.circuitId}
          onChange={(event) => change({ circuitId: event.target.value })}
        >
          {circuits.map((circuit) => (
            <option key={circuit.id} value={circuit.id}>
              {circuit.name}, {circuit.kilowatts} kW
            </option>
          ))}
        </Select>
        <Choice label="Wave" options={waves} value={form.wave} onChange={(wave) => change({ wave })} />
        <p className="text-xs text-muted">Medium wave takes about twice as long as short (trade article).</p>
        {isStale && base && (
          <ChangedMeanwhile>
            <p>
              Now it says: {base.name}, {base.kilowatts} kW,{' '}
              {circuits.find(({ id }) => id === base.circuitId)?.name ?? 'another circuit'}, {base.wave} wave.
            </p>
          </ChangedMeanwhile>
        )}
        {error !== null && !isStale && (
          <ErrorNote error={error} what={lamp ? `${lamp.name} stays as it was.` : 'Nothing was added.'} />
        )}
      </form>
    </Dialog>
  );
}

function useLampForm({ lamp, circuits, onClose, onSaved }: LampDialogProps) {
  const shop = useShop();
  const base = useBase(lamp ?? { version: 0 });
  const initial = lamp ? lampForm(lamp) : newLamp(circuits[0]?.id ?? '');
  const typed = useTypedForm<LampForm, LampFields>(`lamp.${shop.id}.${lamp?.id ?? 'new'}`, initial, readLampForm);
  const done = (saved: Lamp, clashes: Clash[]) => {
    typed.drop();
    showToast(`${saved.name} is saved`, { tone: 'good' });
    onSaved(saved.name, clashes);
    onClose();
  };
  const create = useSetUpWrite(createLamp, (reply) => done(reply.lamp, reply.clashes));
  const change = useSetUpWrite(changeLamp, (reply) => done(reply.lamp, reply.clashes));
  const onError = (error: unknown) => {
    if (base.takeStale(error) === null && error instanceof ApiError) typed.tellFaults(faultsOf<LampForm>(error.fields));
  };
  const send = (fields: LampFields) => {
    const params = { shopId: shop.id };
    if (!lamp) return create.mutate({ params, body: fields }, { onError });
    change.mutate({ params: { ...params, lampId: lamp.id }, body: { ...fields, version: base.version } }, { onError });
  };
  return {
    typed,
    base: 'id' in base.base ? base.base : null,
    send,
    error: lamp ? change.error : create.error,
    busy: create.isPending || change.isPending,
  };
}
