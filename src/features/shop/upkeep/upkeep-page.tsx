import { useQuery } from '@tanstack/react-query';
import { Plus } from 'lucide-react';
import { useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { Clash } from '#contracts/clashes.ts';
import type { ReplyOf } from '#contracts/endpoint.ts';
import type { readHours } from '#contracts/hours.ts';
import type { Place } from '#contracts/places.ts';
import { changeFilter, type Filter } from '#contracts/upkeep.ts';
import { may, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Caution } from '#src/ui/caution.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { ClosureDialog } from '../parts/closure-dialog.tsx';
import { ClosuresTable } from '../parts/closures-table.tsx';
import { RetiredList } from '../parts/retired-list.tsx';
import { filtersQuery, hoursQuery, placesQuery } from '../parts/set-up-queries.ts';
import { ToldClashes } from '../parts/told-clashes.tsx';
import { useSetUpWrite } from '../parts/use-set-up-write.ts';
import { FilterCard } from './filter-card.tsx';
import { FilterDialog } from './filter-dialog.tsx';
import { LogDialog } from './log-dialog.tsx';

export function Component() {
  const shop = useShop();
  const hours = useQuery(hoursQuery(shop.id));
  const places = useQuery(placesQuery(shop.id));
  const filters = useQuery(filtersQuery(shop.id));
  const failed = [hours, places, filters].find(({ isError }) => isError);
  return (
    <Page title="Upkeep" about={shop.name}>
      {failed && (
        <ErrorNote error={failed.error} what="The upkeep could not be loaded." retry={() => void failed.refetch()} />
      )}
      {!failed && !(hours.data && places.data && filters.data) && (
        <SkeletonLines lines={8} label="Loading the upkeep" />
      )}
      {hours.data && places.data && filters.data && (
        <>
          <Maintenance data={hours.data} />
          <Filters filters={filters.data.filters} places={places.data.places} />
        </>
      )}
    </Page>
  );
}

function Maintenance({ data }: { data: ReplyOf<typeof readHours> }) {
  const mayWrite = may.plan(useShop().role);
  const [params, setParams] = useSearchParams();
  const edited = params.get('edit');
  const edit = (id: string | null) => setParams(id === null ? {} : { edit: id }, { replace: id === null });
  const [told, setTold] = useState<{ what: string; clashes: Clash[] } | null>(null);
  const rules = data.closures.filter(({ kind }) => kind === 'maintenance');
  const closure = rules.find(({ id }) => id === edited) ?? (edited === 'new' ? ('maintenance' as const) : null);
  return (
    <section className="flex flex-col gap-3">
      <div className="flex flex-wrap items-center justify-between gap-2">
        <h2>Maintenance</h2>
        {mayWrite && (
          <Button look="primary" icon={<Plus size={16} aria-hidden="true" />} onClick={() => edit('new')}>
            Add maintenance
          </Button>
        )}
      </div>
      {told && <ToldClashes {...told} onClose={() => setTold(null)} />}
      {rules.length === 0 ? (
        <p className="text-muted">
          None yet. What is entered here keeps its place or lamp free: a clean booth every two weeks, a service once a
          year.
        </p>
      ) : (
        <ClosuresTable label="Maintenance" hideKind closures={rules} things={data} edit={mayWrite ? edit : undefined} />
      )}
      {mayWrite && closure && (
        <ClosureDialog
          key={edited}
          closure={closure}
          kinds={['maintenance']}
          things={data}
          onClose={() => edit(null)}
          onSaved={(what, clashes) => setTold({ what, clashes })}
        />
      )}
    </section>
  );
}

const urgency = { due: 0, soon: 1, 'never-changed': 2, good: 3 } as const;

function Filters({ filters, places }: { filters: readonly Filter[]; places: readonly Place[] }) {
  const shop = useShop();
  const [edited, setEdited] = useState<Filter | 'new' | null>(null);
  const [logged, setLogged] = useState<{ filter: Filter; kind: 'change' | 'pressure' } | null>(null);
  const bringBack = useSetUpWrite(changeFilter);
  const mayWrite = may.setUp(shop.role);
  const nameOf = (placeId: string) => places.find(({ id }) => id === placeId)?.name ?? '';
  const inUse = filters
    .filter(({ retired }) => !retired)
    .toSorted(
      (a, b) =>
        urgency[a.standing.state] - urgency[b.standing.state] || nameOf(a.placeId).localeCompare(nameOf(b.placeId)),
    );
  const retired = filters.filter((filter) => filter.retired);
  const placesToFit = places.filter((place) => !place.retired && place.kind !== 'rack');
  return (
    <section className="flex flex-col gap-3">
      <div className="flex flex-wrap items-center justify-between gap-2">
        <h2>Filters</h2>
        {mayWrite && placesToFit.length > 0 && (
          <Button icon={<Plus size={16} aria-hidden="true" />} onClick={() => setEdited('new')}>
            Add a filter
          </Button>
        )}
      </div>
      {inUse.length === 0 && (
        <p className="text-muted">
          No filter yet. Each is due by hours sprayed, by days or by its pressure, whichever comes first.
        </p>
      )}
      <div className="grid items-start gap-4 md:grid-cols-2 xl:grid-cols-3">
        {inUse.map((filter) => (
          <FilterCard
            key={filter.id}
            filter={filter}
            placeName={nameOf(filter.placeId)}
            log={may.workStages(shop.role) ? (kind) => setLogged({ filter, kind }) : undefined}
            edit={mayWrite ? () => setEdited(filter) : undefined}
          />
        ))}
      </div>
      {bringBack.isError && <ErrorNote error={bringBack.error} what="It stays out of use." />}
      <RetiredList
        things={retired.map(({ id, name, placeId }) => ({ id, name: `${name}, ${nameOf(placeId)}` }))}
        busyId={bringBack.isPending ? (bringBack.variables.params.filterId ?? null) : null}
        bringBack={
          mayWrite
            ? (id) => {
                const version = retired.find((filter) => filter.id === id)?.version ?? 1;
                bringBack.mutate({ params: { shopId: shop.id, filterId: id }, body: { version, retired: false } });
              }
            : undefined
        }
      />
      {inUse.length > 0 && (
        <Caution quiet>
          Hours are those of spraying in stages that were tapped done, as planned. A gauge over its limit, a fan that
          sounds wrong or overspray in the room counts before any of these figures.
        </Caution>
      )}
      {edited && (
        <FilterDialog filter={edited === 'new' ? null : edited} places={placesToFit} onClose={() => setEdited(null)} />
      )}
      {logged && <LogDialog {...logged} placeName={nameOf(logged.filter.placeId)} onClose={() => setLogged(null)} />}
    </section>
  );
}
