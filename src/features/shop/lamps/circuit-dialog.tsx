import { useId } from 'react';
import type { Clash } from '#contracts/clashes.ts';
import { changeCircuit, createCircuit, type Circuit, type CircuitFields } from '#contracts/lamps.ts';
import { ApiError, isApiError } from '#src/lib/api-error.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Caution } from '#src/ui/caution.tsx';
import { Choice } from '#src/ui/choice.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { ChangedMeanwhile } from '../parts/changed-meanwhile.tsx';
import { useBase, useSetUpWrite } from '../parts/use-set-up-write.ts';
import { faultsOf, useTypedForm, type Faults } from '../parts/use-typed-form.ts';
import { circuitForm, kilowattsOf, newCircuit, readCircuitForm, type CircuitForm } from './model/circuit-form.ts';

type CircuitDialogProps = {
  /** Null: a new one. */
  circuit: Circuit | null;
  onClose: () => void;
  onSaved: (name: string, clashes: Clash[]) => void;
};

export function CircuitDialog({ circuit, onClose, onSaved }: CircuitDialogProps) {
  const { typed, base, send, error, busy } = useCircuitForm({ circuit, onClose, onSaved });
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
      title={circuit ? circuit.name : 'A new circuit'}
      about="What its lamps may draw together."
      actions={
        <>
          <Button onClick={leave}>Leave it</Button>
          <Button type="submit" form={formId} look="primary" busy={busy}>
            {circuit ? 'Save' : 'Add it'}
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
          label="Limit, kW"
          hint="No plan has more kilowatts of lamps burning on it at once."
          inputMode="decimal"
          autoComplete="off"
          error={faults.kilowatts}
          value={form.kilowatts}
          onChange={(event) => change({ kilowatts: event.target.value })}
        />
        <Breaker form={form} change={change} faults={faults} />
        {isStale && base && (
          <ChangedMeanwhile>
            <p>
              Now it says: {base.name}, {base.kilowatts} kW.
            </p>
          </ChangedMeanwhile>
        )}
        {error !== null && !isStale && (
          <ErrorNote error={error} what={circuit ? `${circuit.name} stays as it was.` : 'Nothing was added.'} />
        )}
        <Caution quiet>A planning figure: cable, demand and local code are the licensed electrician&rsquo;s.</Caution>
      </form>
    </Dialog>
  );
}

const phases = [
  { value: '1', label: 'One' },
  { value: '3', label: 'Three' },
] as const;

type BreakerProps = {
  form: CircuitForm;
  change: (more: Partial<CircuitForm>) => void;
  faults: Faults<CircuitForm>;
};

/** Volts and amperes to kilowatts, in full and at 80 %. */
function Breaker({ form, change, faults }: BreakerProps) {
  const kilowatts = kilowattsOf(form);
  return (
    <fieldset className="flex min-w-0 flex-col gap-3 rounded border border-line px-3.5 py-3">
      <legend className="px-1 font-semibold">From the breaker (optional)</legend>
      <div className="grid grid-cols-2 gap-3">
        <TextField
          label="Volts"
          inputMode="decimal"
          autoComplete="off"
          error={faults.volts}
          value={form.volts}
          onChange={(event) => change({ volts: event.target.value })}
        />
        <TextField
          label="Breaker, A"
          inputMode="decimal"
          autoComplete="off"
          error={faults.breaker}
          value={form.breaker}
          onChange={(event) => change({ breaker: event.target.value })}
        />
      </div>
      <Choice label="Phases" options={phases} value={form.phases} onChange={(next) => change({ phases: next })} />
      {kilowatts && (
        <div className="flex flex-wrap gap-2">
          <Button size="small" onClick={() => change({ kilowatts: String(kilowatts.eighty) })}>
            Use {kilowatts.eighty} kW, 80 %
          </Button>
          <Button size="small" onClick={() => change({ kilowatts: String(kilowatts.full) })}>
            Use {kilowatts.full} kW, all of it
          </Button>
        </div>
      )}
      <p className="text-xs text-muted">
        Three hours and more is a continuous load: only 80 % of the breaker counts (NEC 210.20(A)). Many shops keep to
        it always.
      </p>
    </fieldset>
  );
}

function useCircuitForm({ circuit, onClose, onSaved }: CircuitDialogProps) {
  const shop = useShop();
  const base = useBase(circuit ?? { version: 0 });
  const initial = circuit ? circuitForm(circuit) : newCircuit;
  const typed = useTypedForm<CircuitForm, CircuitFields>(
    `circuit.${shop.id}.${circuit?.id ?? 'new'}`,
    initial,
    readCircuitForm,
  );
  const done = (saved: Circuit, clashes: Clash[]) => {
    typed.drop();
    showToast(`${saved.name} is saved`, { tone: 'good' });
    onSaved(saved.name, clashes);
    onClose();
  };
  const create = useSetUpWrite(createCircuit, (reply) => done(reply.circuit, reply.clashes));
  const change = useSetUpWrite(changeCircuit, (reply) => done(reply.circuit, reply.clashes));
  const onError = (error: unknown) => {
    if (base.takeStale(error) === null && error instanceof ApiError)
      typed.tellFaults(faultsOf<CircuitForm>(error.fields));
  };
  const send = (fields: CircuitFields) => {
    const params = { shopId: shop.id };
    if (!circuit) return create.mutate({ params, body: fields }, { onError });
    const body = { ...fields, version: base.version };
    change.mutate({ params: { ...params, circuitId: circuit.id }, body }, { onError });
  };
  return {
    typed,
    base: 'id' in base.base ? base.base : null,
    send,
    error: circuit ? change.error : create.error,
    busy: create.isPending || change.isPending,
  };
}
