import { exportAbsences, importAbsences, removeAbsence, type Absence, type Person } from '#contracts/people.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { Badge } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Table, Td, Th } from '#src/ui/table.tsx';
import { CsvPanel } from '../parts/csv-panel.tsx';
import { useDeed } from './people-query.ts';
import { sayAbsence } from './model/say-absence.ts';

/** Who is away now and to come, by its start. What is over is kept for the record and not shown. */
export function Absences({ people }: { people: readonly Person[] }) {
  const shop = useShop();
  const { today, dayOf } = useFormats();
  const remove = useDeed(removeAbsence, () => undefined);
  const rows = people
    .flatMap((person) => person.absences.map((absence) => ({ person, absence })))
    .filter(({ absence }) => absence.to === null || dayOf(absence.to) >= today())
    .sort((a, b) => a.absence.from.localeCompare(b.absence.from));
  return (
    <section className="flex flex-col gap-3" aria-labelledby="away">
      <header className="flex flex-wrap items-center justify-between gap-2">
        <h2 id="away">Away</h2>
        <div className="flex flex-wrap gap-2">
          <CsvPanel
            what="absences"
            exportFrom={exportAbsences}
            importTo={importAbsences}
            columns="One line an absence: person (by name), from and to (2027-03-31, or with a time 2027-03-31 13:00; an empty end is until further notice), reason. Absences that are there already are left as they are."
          />
        </div>
      </header>
      {remove.isError && <ErrorNote error={remove.error} what="The absence stands." />}
      {rows.length === 0 ? (
        <p className="text-muted">Nobody is away now or later, as far as was entered.</p>
      ) : (
        <Table label="Absences">
          <thead>
            <tr>
              <Th>Who</Th>
              <Th>When</Th>
              <Th>Reason</Th>
              <Th>
                <span className="sr-only">Deeds</span>
              </Th>
            </tr>
          </thead>
          <tbody>
            {rows.map(({ person, absence }) => (
              <Row
                key={absence.id}
                person={person}
                absence={absence}
                busy={remove.isPending && remove.variables.params.absenceId === absence.id}
                onRemove={() =>
                  remove.mutate({ params: { shopId: shop.id, personId: person.id, absenceId: absence.id } })
                }
              />
            ))}
          </tbody>
        </Table>
      )}
    </section>
  );
}

type RowProps = { person: Person; absence: Absence; busy: boolean; onRemove: () => void };

function Row({ person, absence, busy, onRemove }: RowProps) {
  const formats = useFormats();
  const isLeaving = person.leavesOn !== null && absence.to === null;
  return (
    <tr>
      <Td className="font-semibold">{person.name}</Td>
      <Td className="figures">
        {sayAbsence(absence, formats)} {absence.from <= new Date().toISOString() && <Badge tone="petrol">now</Badge>}
      </Td>
      <Td className="wrap-anywhere">{absence.reason}</Td>
      <Td className="text-right">
        {!isLeaving && (
          <Button size="small" look="quiet" busy={busy} onClick={onRemove}>
            Take back<span className="sr-only">: {person.name} is there</span>
          </Button>
        )}
      </Td>
    </tr>
  );
}
