import { useQuery } from '@tanstack/react-query';
import { Plus } from 'lucide-react';
import { useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { Clash } from '#contracts/clashes.ts';
import type { ReplyOf } from '#contracts/endpoint.ts';
import {
  bringBackLamp,
  exportLamps,
  importLamps,
  orderLamps,
  retireLamp,
  type Lamp,
  type listLamps,
} from '#contracts/lamps.ts';
import { may, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Caution } from '#src/ui/caution.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { CsvPanel } from '../parts/csv-panel.tsx';
import { moved } from '../parts/moved.ts';
import { RetireDialog } from '../parts/retire-dialog.tsx';
import { RetiredList } from '../parts/retired-list.tsx';
import { lampsQuery } from '../parts/set-up-queries.ts';
import { ToldClashes } from '../parts/told-clashes.tsx';
import { useSetUpWrite } from '../parts/use-set-up-write.ts';
import { CircuitCard } from './circuit-card.tsx';
import { CircuitDialog } from './circuit-dialog.tsx';
import { LampDialog } from './lamp-dialog.tsx';

const columns =
  'One line a lamp: name, circuit (its name; circuits are made on the page first), kilowatts and wave (short or medium). Lamps are found by their name. An export shows how it looks.';

type Edited = { lamp: string } | { circuit: string } | null;

export function Component() {
  const shop = useShop();
  const mayWrite = may.setUp(shop.role);
  const lamps = useQuery(lampsQuery(shop.id));
  const [params, setParams] = useSearchParams();
  const edit = (next: Edited) => setParams(next ?? {}, { replace: next === null });
  const hasCircuit = (lamps.data?.circuits.length ?? 0) > 0;
  const addCircuit = (
    <Button
      look={hasCircuit ? 'plain' : 'primary'}
      icon={<Plus size={16} aria-hidden="true" />}
      onClick={() => edit({ circuit: 'new' })}
    >
      Add a circuit
    </Button>
  );
  return (
    <Page
      title="Lamps and circuits"
      about={shop.name}
      actions={
        <>
          <CsvPanel
            what="lamps"
            exportFrom={exportLamps}
            importTo={mayWrite ? importLamps : undefined}
            columns={columns}
          />
          {mayWrite && addCircuit}
          {mayWrite && hasCircuit && (
            <Button look="primary" icon={<Plus size={16} aria-hidden="true" />} onClick={() => edit({ lamp: 'new' })}>
              Add a lamp
            </Button>
          )}
        </>
      }
    >
      {lamps.isPending && <SkeletonLines lines={8} label="Loading the lamps" />}
      {lamps.isError && (
        <ErrorNote error={lamps.error} what="The lamps could not be loaded." retry={() => void lamps.refetch()} />
      )}
      {lamps.data && !hasCircuit && (
        <EmptyState title="No circuit and no lamp yet" action={mayWrite ? addCircuit : undefined}>
          <p>First the circuits with what they carry, then the cure lamps that hang on them.</p>
        </EmptyState>
      )}
      {lamps.data && (
        <Loaded
          data={lamps.data}
          mayWrite={mayWrite}
          edited={{ lamp: params.get('lamp'), circuit: params.get('circuit') }}
          edit={edit}
        />
      )}
    </Page>
  );
}

type LoadedProps = {
  data: ReplyOf<typeof listLamps>;
  mayWrite: boolean;
  edited: { lamp: string | null; circuit: string | null };
  edit: (next: Edited) => void;
};

function Loaded({ data, mayWrite, edited, edit }: LoadedProps) {
  const [told, setTold] = useState<{ what: string; clashes: Clash[] } | null>(null);
  const onSaved = (what: string, clashes: Clash[]) => setTold({ what, clashes });
  const lamp = data.lamps.find(({ id }) => id === edited.lamp) ?? null;
  const circuit = data.circuits.find(({ id }) => id === edited.circuit) ?? null;
  return (
    <>
      {told && <ToldClashes {...told} onClose={() => setTold(null)} />}
      <Circuits data={data} mayWrite={mayWrite} edit={edit} />
      {mayWrite && (lamp || edited.lamp === 'new') && (
        <LampDialog
          key={lamp?.id ?? 'new'}
          lamp={lamp}
          circuits={data.circuits}
          onClose={() => edit(null)}
          onSaved={onSaved}
        />
      )}
      {mayWrite && (circuit || edited.circuit === 'new') && (
        <CircuitDialog key={circuit?.id ?? 'new'} circuit={circuit} onClose={() => edit(null)} onSaved={onSaved} />
      )}
    </>
  );
}

function Circuits({ data: { lamps, circuits }, mayWrite, edit }: Omit<LoadedProps, 'edited'>) {
  const shop = useShop();
  const [leaving, setLeaving] = useState<Lamp | null>(null);
  const order = useSetUpWrite(orderLamps);
  const retire = useSetUpWrite(retireLamp, () => setLeaving(null));
  const bringBack = useSetUpWrite(bringBackLamp);
  const inUse = lamps.filter(({ retired }) => !retired);
  const retired = lamps.filter((lamp) => lamp.retired);
  const act = {
    editCircuit: (circuit: string) => edit({ circuit }),
    editLamp: (lamp: string) => edit({ lamp }),
    retire: (lamp: Lamp) => {
      retire.reset();
      setLeaving(lamp);
    },
    // Lamps of one circuit stand together; within it the order is free, and the whole list is sent.
    move: (lamp: Lamp, by: -1 | 1) => {
      const lists = circuits.map(({ id }) => inUse.filter(({ circuitId }) => circuitId === id).map((one) => one.id));
      const lampIds = lists.flatMap((ids) => moved(ids, lamp.id, by));
      order.mutate({ params: { shopId: shop.id }, body: { lampIds } });
    },
  };
  return (
    <>
      {order.isError && <ErrorNote error={order.error} what="The order stays as it was." />}
      {bringBack.isError && <ErrorNote error={bringBack.error} what="It stays out of use." />}
      <div className="grid gap-4 xl:grid-cols-2">
        {circuits.map((circuit) => (
          <CircuitCard
            key={circuit.id}
            circuit={circuit}
            lamps={inUse.filter((lamp) => lamp.circuitId === circuit.id)}
            act={mayWrite ? act : undefined}
          />
        ))}
      </div>
      <RetiredList
        things={retired}
        busyId={bringBack.isPending ? (bringBack.variables.params.lampId ?? null) : null}
        bringBack={
          mayWrite
            ? (id) => {
                const version = retired.find((lamp) => lamp.id === id)?.version ?? 1;
                bringBack.mutate({ params: { shopId: shop.id, lampId: id }, body: { version } });
              }
            : undefined
        }
      />
      {circuits.length > 0 && (
        <Caution quiet>
          Lamps and their leads are out of the booth before anybody sprays. Distances and times are the maker&rsquo;s;
          circuits are the licensed electrician&rsquo;s.
        </Caution>
      )}
      {leaving && (
        <RetireDialog
          name={leaving.name}
          busy={retire.isPending}
          error={retire.error}
          onClose={() => setLeaving(null)}
          onRetire={() =>
            retire.mutate({ params: { shopId: shop.id, lampId: leaving.id }, body: { version: leaving.version } })
          }
        />
      )}
    </>
  );
}
