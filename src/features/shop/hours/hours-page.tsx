import { useQuery } from '@tanstack/react-query';
import { Plus, TriangleAlert } from 'lucide-react';
import { useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { Clash } from '#contracts/clashes.ts';
import { exportClosures, importClosures, type ClosureKind } from '#contracts/hours.ts';
import { formatDay } from '#src/lib/formats.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Choice } from '#src/ui/choice.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { ClosureDialog } from '../parts/closure-dialog.tsx';
import { CsvPanel } from '../parts/csv-panel.tsx';
import { hoursQuery } from '../parts/set-up-queries.ts';
import { ToldClashes } from '../parts/told-clashes.tsx';
import { ClosuresList } from './closures-list.tsx';
import { ExtraHours } from './extra-hours.tsx';
import { MonthView } from './month-view.tsx';
import type { Hours } from './model/month.ts';
import { WeekCard } from './week-card.tsx';
import { WeekDialog } from './week-dialog.tsx';

const columns =
  'One line a closure: kind (holiday, closure, maintenance or breakdown), label, of (a place or lamp by name; empty for the whole shop), starts (2026-12-24 or 2026-12-24 12:00), rule (as RFC 5545 writes it; empty for once) and minutes. Lines that are there already are passed over. An export shows how it looks.';

/** Kinds that are entered here; maintenance has the page for upkeep. */
const kinds: readonly ClosureKind[] = ['holiday', 'closure', 'breakdown'];

export function Component() {
  const shop = useShop();
  const hours = useQuery(hoursQuery(shop.id));
  const mayClose = may.plan(shop.role);
  const [params, setParams] = useSearchParams();
  const edit = (id: string | null) => setParams(withEdit(params, id), { replace: id === null });
  return (
    <Page
      title="Hours and closures"
      about={hours.data ? `${shop.name}, on the clock of ${hours.data.timeZone}` : shop.name}
      actions={
        <>
          <CsvPanel
            what="closures"
            exportFrom={exportClosures}
            importTo={mayClose ? importClosures : undefined}
            columns={columns}
          />
          {mayClose && (
            <>
              <Button icon={<TriangleAlert size={16} aria-hidden="true" />} onClick={() => edit('breakdown')}>
                Breakdown
              </Button>
              <Button look="primary" icon={<Plus size={16} aria-hidden="true" />} onClick={() => edit('holiday')}>
                Holiday or closure
              </Button>
            </>
          )}
        </>
      }
    >
      {hours.isPending && <SkeletonLines lines={8} label="Loading the hours" />}
      {hours.isError && (
        <ErrorNote error={hours.error} what="The hours could not be loaded." retry={() => void hours.refetch()} />
      )}
      {hours.data && <Loaded data={hours.data} edited={params.get('edit')} edit={edit} mayClose={mayClose} />}
    </Page>
  );
}

/** What else the address says, such as the month that is looked at, stays. */
function withEdit(params: URLSearchParams, id: string | null): URLSearchParams {
  const next = new URLSearchParams(params);
  if (id === null) next.delete('edit');
  else next.set('edit', id);
  return next;
}

type LoadedProps = { data: Hours; edited: string | null; edit: (id: string | null) => void; mayClose: boolean };

function Loaded({ data, edited, edit, mayClose }: LoadedProps) {
  const [told, setTold] = useState<{ what: string; clashes: Clash[] } | null>(null);
  const onSaved = (what: string, clashes: Clash[]) => setTold({ what, clashes });
  const closure = data.closures.find(({ id }) => id === edited) ?? kinds.find((kind) => kind === edited);
  return (
    <>
      {told && <ToldClashes {...told} onClose={() => setTold(null)} />}
      <Week data={data} onSaved={onSaved} />
      <Closed data={data} edit={mayClose ? edit : undefined} />
      {mayClose && closure && (
        <ClosureDialog
          key={edited}
          closure={closure}
          kinds={typeof closure === 'string' || kinds.includes(closure.kind) ? kinds : [closure.kind]}
          things={data}
          onClose={() => edit(null)}
          onSaved={onSaved}
        />
      )}
    </>
  );
}

function Week({ data, onSaved }: { data: Hours; onSaved: (what: string, clashes: Clash[]) => void }) {
  const mayWrite = may.setUp(useShop().role);
  const { today } = useFormats();
  const [isEditing, setEditing] = useState(false);
  return (
    <section className="flex flex-col gap-3">
      <div className="flex flex-wrap items-center justify-between gap-2">
        <h2>Open</h2>
        {mayWrite && <Button onClick={() => setEditing(true)}>Change the week</Button>}
      </div>
      {data.week.length === 0 && data.next === null && (
        <p className="text-amber">
          No opening hours yet: nothing can be planned.{' '}
          {mayWrite ? 'Enter the usual week first.' : 'An owner enters them.'}
        </p>
      )}
      <WeekCard week={data.week} />
      {data.next && (
        <>
          <p className="font-semibold">From {formatDay(data.next.from, 'short', today())} on</p>
          <WeekCard week={data.next.week} />
        </>
      )}
      <ExtraHours extra={data.extra} mayWrite={mayWrite} onSaved={onSaved} />
      {isEditing && (
        <WeekDialog
          hours={{ version: data.version, week: data.next?.week ?? data.week }}
          onClose={() => setEditing(false)}
          onSaved={onSaved}
        />
      )}
    </section>
  );
}

const views = [
  { value: 'list', label: 'List' },
  { value: 'month', label: 'Month' },
] as const;

/** What is closed when, as a list or as a month that shows the hours too. The address says which. */
function Closed({ data, edit }: { data: Hours; edit: ((id: string) => void) | undefined }) {
  const [params, setParams] = useSearchParams();
  const view = params.get('view') === 'month' ? 'month' : 'list';
  const onChange = (next: 'list' | 'month') =>
    setParams(next === 'month' ? { view: next } : {}, { preventScrollReset: true });
  return (
    <section className="flex flex-col gap-3">
      <div className="flex flex-wrap items-center justify-between gap-2">
        <h2>{view === 'month' ? 'Open and closed' : 'Closed'}</h2>
        <Choice label="Show as" hideLabel options={views} value={view} onChange={onChange} />
      </div>
      {view === 'month' ? (
        <MonthView data={data} mayClose={edit !== undefined} />
      ) : (
        <ClosuresList data={data} edit={edit} />
      )}
    </section>
  );
}
