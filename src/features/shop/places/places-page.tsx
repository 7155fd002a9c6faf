import { useQuery } from '@tanstack/react-query';
import { Plus } from 'lucide-react';
import { useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { Clash } from '#contracts/clashes.ts';
import {
  bringBackPlace,
  exportPlaces,
  importPlaces,
  orderPlaces,
  retirePlace,
  type Place,
  type Zone,
} from '#contracts/places.ts';
import { may, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { CsvPanel } from '../parts/csv-panel.tsx';
import { moved } from '../parts/moved.ts';
import { placeKinds, placeKindTitle } from '../parts/place-kinds.ts';
import { RetireDialog } from '../parts/retire-dialog.tsx';
import { RetiredList } from '../parts/retired-list.tsx';
import { placesQuery } from '../parts/set-up-queries.ts';
import { ToldClashes } from '../parts/told-clashes.tsx';
import { useSetUpWrite } from '../parts/use-set-up-write.ts';
import { PlaceDialog } from './place-dialog.tsx';
import { PlacesTable } from './places-table.tsx';
import { Zones } from './zones.tsx';

const columns =
  'One line a place: name, kind (booth, prep or rack), units, and for booths and stations zone, bakes (yes or no), bake limit celsius, volume m3, air flow (m³ an hour) and clearance minutes. Places are found by their name; zones that are not there yet are made. An export shows how it looks.';

export function Component() {
  const shop = useShop();
  const mayWrite = may.setUp(shop.role);
  const places = useQuery(placesQuery(shop.id));
  const [params, setParams] = useSearchParams();
  const edit = (id: string | null) => setParams(id === null ? {} : { edit: id }, { replace: id === null });
  const [told, setTold] = useState<{ what: string; clashes: Clash[] } | null>(null);
  const add = mayWrite && (
    <Button look="primary" icon={<Plus size={16} aria-hidden="true" />} onClick={() => edit('new')}>
      Add a place
    </Button>
  );
  const edited = places.data?.places.find(({ id }) => id === params.get('edit')) ?? null;
  return (
    <Page
      title="Booths and stations"
      about={shop.name}
      actions={
        <>
          <CsvPanel
            what="places"
            exportFrom={exportPlaces}
            importTo={mayWrite ? importPlaces : undefined}
            columns={columns}
          />
          {add}
        </>
      }
    >
      {places.isPending && <SkeletonLines lines={8} label="Loading the places" />}
      {places.isError && (
        <ErrorNote error={places.error} what="The places could not be loaded." retry={() => void places.refetch()} />
      )}
      {told && <ToldClashes {...told} onClose={() => setTold(null)} />}
      {places.data?.places.length === 0 && (
        <EmptyState title="No booth and no station yet" action={add || undefined}>
          <p>Spray booths, prep stations and racks. The booth day has a row for each of them.</p>
        </EmptyState>
      )}
      {places.data && places.data.places.length > 0 && (
        <Lists {...places.data} edit={mayWrite ? edit : undefined} mayWrite={mayWrite} />
      )}
      {places.data && mayWrite && (edited || params.get('edit') === 'new') && (
        <PlaceDialog
          key={edited?.id ?? 'new'}
          place={edited}
          zones={places.data.zones}
          onClose={() => edit(null)}
          onSaved={(what, clashes) => setTold({ what, clashes })}
        />
      )}
    </Page>
  );
}

type ListsProps = {
  places: readonly Place[];
  zones: readonly Zone[];
  edit: ((id: string) => void) | undefined;
  mayWrite: boolean;
};

function Lists({ places, zones, edit, mayWrite }: ListsProps) {
  const shop = useShop();
  const [leaving, setLeaving] = useState<Place | null>(null);
  const order = useSetUpWrite(orderPlaces);
  const retire = useSetUpWrite(retirePlace, () => setLeaving(null));
  const bringBack = useSetUpWrite(bringBackPlace);
  const inUse = places.filter(({ retired }) => !retired);
  const retired = places.filter((place) => place.retired);
  // Kinds stand apart; within one the order is free, and the whole list is sent.
  const move = (place: Place, by: -1 | 1) => {
    const lists = placeKinds.map((kind) => inUse.filter((one) => one.kind === kind).map(({ id }) => id));
    const placeIds = lists.flatMap((ids) => moved(ids, place.id, by));
    order.mutate({ params: { shopId: shop.id }, body: { placeIds } });
  };
  return (
    <>
      {order.isError && <ErrorNote error={order.error} what="The order stays as it was." />}
      {bringBack.isError && <ErrorNote error={bringBack.error} what="It stays out of use." />}
      {placeKinds
        .map((kind) => ({ kind, list: inUse.filter((place) => place.kind === kind) }))
        .filter(({ list }) => list.length > 0)
        .map(({ kind, list }) => (
          <PlacesTable
            key={kind}
            kind={kind}
            title={placeKindTitle[kind]}
            places={list}
            zones={zones}
            edit={edit}
            retire={(place) => {
              retire.reset();
              setLeaving(place);
            }}
            onMove={move}
          />
        ))}
      <RetiredList
        things={retired}
        busyId={bringBack.isPending ? (bringBack.variables.params.placeId ?? null) : null}
        bringBack={
          mayWrite
            ? (id) => {
                const version = retired.find((place) => place.id === id)?.version ?? 1;
                bringBack.mutate({ params: { shopId: shop.id, placeId: id }, body: { version } });
              }
            : undefined
        }
      />
      <Zones zones={zones} places={places} mayWrite={mayWrite} />
      {leaving && (
        <RetireDialog
          name={leaving.name}
          busy={retire.isPending}
          error={retire.error}
          onClose={() => setLeaving(null)}
          onRetire={() =>
            retire.mutate({
              params: { shopId: shop.id, placeId: leaving.id },
              body: { version: leaving.version },
            })
          }
        />
      )}
    </>
  );
}
