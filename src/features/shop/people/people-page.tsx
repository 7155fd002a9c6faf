import { useQuery } from '@tanstack/react-query';
import { UserPlus } from 'lucide-react';
import { useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import { exportPeople, importPeople, type Clash, type Person } from '#contracts/people.ts';
import { may, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { CsvPanel } from '../parts/csv-panel.tsx';
import { AbsenceDialog } from './absence-dialog.tsx';
import { Absences } from './absences.tsx';
import { ClashesDialog } from './clashes-dialog.tsx';
import { peopleQuery, type Roster } from './people-query.ts';
import { PeopleTable } from './people-table.tsx';
import { PersonDialog } from './person-dialog.tsx';
import { Retired } from './retired.tsx';
import { RetireDialog } from './retire-dialog.tsx';

export function Component() {
  const { role } = useShop();
  if (may.plan(role)) return <People />;
  return (
    <Page title="People" width="text">
      <p>Only leads and owners see this page. Ask one of them if you need something from it.</p>
    </Page>
  );
}

const columns =
  'One line a person: name, skills (divided by ;), spray trained on (2025-03-31), and monday to sunday with hours such as 7:00-15:30 (9:30-9:45). People are found by their name; columns that are missing leave things as they are. An export shows how it looks.';

function People() {
  const shop = useShop();
  const mayWrite = may.setUp(shop.role);
  const people = useQuery(peopleQuery(shop.id));
  const [params, setParams] = useSearchParams();
  const edit = (id: string | null) => setParams(id === null ? {} : { edit: id }, { replace: id === null });
  const add = mayWrite && (
    <Button look="primary" icon={<UserPlus size={16} aria-hidden="true" />} onClick={() => edit('new')}>
      Add a person
    </Button>
  );
  return (
    <Page
      title="People"
      about={shop.name}
      actions={
        <>
          <CsvPanel
            what="people"
            exportFrom={exportPeople}
            importTo={mayWrite ? importPeople : undefined}
            columns={columns}
          />
          {add}
        </>
      }
    >
      {people.isPending && <SkeletonLines lines={8} label="Loading the people" />}
      {people.isError && (
        <ErrorNote error={people.error} what="The people could not be loaded." retry={() => void people.refetch()} />
      )}
      {people.data?.people.length === 0 && (
        <EmptyState title="Nobody is on the roster yet" action={add || undefined}>
          <p>Who works here, with which skills and at which hours. Plans give work only to who is here.</p>
        </EmptyState>
      )}
      {people.data && people.data.people.length > 0 && <Lists roster={people.data} edit={edit} />}
      {people.data && mayWrite && <Editor roster={people.data} edited={params.get('edit')} edit={edit} />}
    </Page>
  );
}

type Told = { name: string; clashes: Clash[] };

/** The dialog that the address names, and what a change has brought up. */
function Editor({
  roster,
  edited,
  edit,
}: {
  roster: Roster;
  edited: string | null;
  edit: (id: string | null) => void;
}) {
  const [told, setTold] = useState<Told | null>(null);
  const person = roster.people.find(({ id }) => id === edited) ?? null;
  return (
    <>
      {(edited === 'new' || person) && (
        <PersonDialog
          key={edited}
          person={person}
          roster={roster}
          onClose={() => edit(null)}
          onClashes={(name, clashes) => setTold({ name, clashes })}
        />
      )}
      {told && <ClashesDialog {...told} onClose={() => setTold(null)} />}
    </>
  );
}

function Lists({ roster, edit }: { roster: Roster; edit: (id: string) => void }) {
  const [away, setAway] = useState<Person | null>(null);
  const [leaving, setLeaving] = useState<Person | null>(null);
  const [told, setTold] = useState<Told | null>(null);
  const here = roster.people.filter(({ retired }) => !retired);
  const retired = roster.people.filter((person) => person.retired);
  return (
    <>
      <PeopleTable people={here} edit={edit} setAway={setAway} setLeaving={setLeaving} />
      <p className="text-xs text-muted">
        {roster.trainingBlocks
          ? 'Who has no good spray training is given no spray stage.'
          : 'Who has no good spray training is only warned of: the shop’s settings say so.'}{' '}
        Primers and sealers count as spraying, sanding does not. It is a record for planning: your local rules and the
        people responsible for them come first.
      </p>
      <Absences people={here} />
      {retired.length > 0 && <Retired people={retired} />}
      {away && (
        <AbsenceDialog
          person={away}
          onClose={() => setAway(null)}
          onClashes={(name, clashes) => setTold({ name, clashes })}
        />
      )}
      {leaving && <RetireDialog person={leaving} onClose={() => setLeaving(null)} />}
      {told && <ClashesDialog {...told} onClose={() => setTold(null)} />}
    </>
  );
}
