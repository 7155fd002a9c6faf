import { ArrowDown, ArrowUp } from 'lucide-react';
import { orderPeople, type Person } from '#contracts/people.ts';
import { formatDay } from '#src/lib/formats.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { Badge } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { Table, Td, Th } from '#src/ui/table.tsx';
import { sayShifts } from './model/say-week.ts';
import { trainingWords } from './model/training-words.ts';
import { useDeed } from './people-query.ts';

type PeopleTableProps = {
  people: readonly Person[];
  edit: (id: string) => void;
  setAway: (person: Person) => void;
  setLeaving: (person: Person) => void;
};

/** Who works here, in the order of the booth day's rows. */
export function PeopleTable({ people, ...deeds }: PeopleTableProps) {
  const shop = useShop();
  const order = useDeed(orderPeople, () => undefined);
  const move = (at: number, by: number) => {
    const ids = people.map(({ id }) => id);
    const [moved] = ids.splice(at, 1);
    if (moved !== undefined) ids.splice(at + by, 0, moved);
    order.mutate({ params: { shopId: shop.id }, body: { personIds: ids } });
  };
  return (
    <>
      {order.isError && <ErrorNote error={order.error} what="The order stays as it was." />}
      <Table label="People">
        <thead className="max-sm:hidden">
          <tr>
            <Th>Name</Th>
            <Th>Skills</Th>
            <Th>Hours</Th>
            <Th>Spray training</Th>
            <Th>
              <span className="sr-only">Deeds</span>
            </Th>
          </tr>
        </thead>
        <tbody>
          {people.map((person, at) => (
            <Row
              key={person.id}
              person={person}
              {...deeds}
              up={at > 0 && !order.isPending ? () => move(at, -1) : null}
              down={at < people.length - 1 && !order.isPending ? () => move(at, 1) : null}
            />
          ))}
        </tbody>
      </Table>
    </>
  );
}

type RowProps = Omit<PeopleTableProps, 'people'> & {
  person: Person;
  up: (() => void) | null;
  down: (() => void) | null;
};

function Row({ person, edit, setAway, setLeaving, up, down }: RowProps) {
  const shop = useShop();
  const { clock, today } = useFormats();
  const mayWrite = may.setUp(shop.role);
  const training = trainingWords(person, today());
  const hours = sayShifts(person.shifts, clock);
  return (
    // On a phone each person is a block, with the deeds in sight.
    <tr className="max-sm:flex max-sm:flex-wrap max-sm:items-center max-sm:border-t max-sm:border-line max-sm:py-2 max-sm:first:border-t-0 max-sm:*:border-t-0 max-sm:*:py-1">
      <Td className="max-sm:w-full">
        <span className="font-semibold">{person.name}</span>
        {person.member && <span className="block text-xs text-muted">signs in as {person.member.name}</span>}
        {person.leavesOn !== null && (
          <Badge tone="amber">last day {formatDay(person.leavesOn, 'short', today())}</Badge>
        )}
      </Td>
      <Td>
        {person.skills.length === 0 ? (
          <span className="text-muted">none</span>
        ) : (
          <span className="flex max-w-56 flex-wrap gap-1">
            {person.skills.map((skill) => (
              <Badge key={skill}>{skill}</Badge>
            ))}
          </span>
        )}
      </Td>
      <Td className="figures">
        {hours.length === 0 && <Badge tone="amber">no hours</Badge>}
        {hours.map((line) => (
          <span key={line} className="block whitespace-nowrap">
            {line}
          </span>
        ))}
      </Td>
      <Td>
        <Badge tone={training.tone}>{training.word}</Badge>
      </Td>
      <Td className="whitespace-nowrap max-sm:w-full max-sm:px-1 sm:text-right">
        {mayWrite && (
          <>
            <IconButton
              size="small"
              label={`Move ${person.name} up`}
              icon={<ArrowUp size={16} aria-hidden="true" />}
              disabled={!up}
              onClick={() => up?.()}
            />
            <IconButton
              size="small"
              label={`Move ${person.name} down`}
              icon={<ArrowDown size={16} aria-hidden="true" />}
              disabled={!down}
              onClick={() => down?.()}
            />
          </>
        )}
        <Button size="small" look="quiet" onClick={() => setAway(person)}>
          Away<span className="sr-only">: {person.name}</span>
        </Button>
        {mayWrite && (
          <>
            <Button size="small" look="quiet" onClick={() => setLeaving(person)}>
              Leaves<span className="sr-only">: {person.name}</span>
            </Button>
            <Button size="small" className="ml-1" onClick={() => edit(person.id)}>
              Edit<span className="sr-only"> {person.name}</span>
            </Button>
          </>
        )}
      </Td>
    </tr>
  );
}
