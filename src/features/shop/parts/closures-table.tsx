import { createClosure, removeClosure, type Closure } from '#contracts/hours.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { instantOf } from '#src/lib/wall-clock.ts';
import { Badge, type Tone } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Table, Td, Th } from '#src/ui/table.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { closureWords, nameOfThing, type Things } from './closure-form.ts';
import { nextTimes } from './recurrence-dates.ts';
import { sayRecurrence } from './recurrence-words.ts';
import { useSetUpWrite } from './use-set-up-write.ts';

type ClosuresTableProps = {
  label: string;
  closures: readonly Closure[];
  things: Things;
  /** Where all are of one kind, which the heading says. */
  hideKind?: boolean;
  /** Absent: looked at only. */
  edit?: ((id: string) => void) | undefined;
};

const tones: Record<Closure['kind'], Tone> = {
  holiday: 'moss',
  closure: 'plain',
  maintenance: 'petrol',
  breakdown: 'crimson',
};

/** Closures with what they are of, their rule in words and the next time. Removing can be taken back. */
export function ClosuresTable({ label, closures, things, hideKind = false, edit }: ClosuresTableProps) {
  const shop = useShop();
  const putBack = useSetUpWrite(createClosure, () => showToast('It is back', { tone: 'good' }));
  const remove = useSetUpWrite(removeClosure);
  const onRemove = (closure: Closure) =>
    remove.mutate(
      { params: { shopId: shop.id, closureId: closure.id }, body: { version: closure.version } },
      {
        onSuccess: () => {
          const { id: _id, version: _version, ...fields } = closure;
          const run = () => putBack.mutate({ params: { shopId: shop.id }, body: fields });
          showToast(`${closure.label || closureWords[closure.kind]} was removed`, { act: { label: 'Undo', run } });
        },
      },
    );
  return (
    <>
      {remove.isError && <ErrorNote error={remove.error} what="It was not removed." />}
      {putBack.isError && <ErrorNote error={putBack.error} what="It could not be put back." />}
      <Table label={label}>
        <thead>
          <tr>
            <Th>What</Th>
            <Th className="max-sm:hidden">Of</Th>
            <Th>When</Th>
            <Th className="max-sm:hidden">Next</Th>
            {edit && (
              <Th>
                <span className="sr-only">What can be done</span>
              </Th>
            )}
          </tr>
        </thead>
        <tbody>
          {closures.map((closure) => (
            <tr key={closure.id}>
              <Td>
                {!(hideKind && closure.label) && <Badge tone={tones[closure.kind]}>{closureWords[closure.kind]}</Badge>}
                {closure.label && <span className="block font-semibold">{closure.label}</span>}
                <span className="block sm:hidden">{nameOfThing(things, closure)}</span>
              </Td>
              <Td className="max-sm:hidden">{nameOfThing(things, closure)}</Td>
              <Td className="sm:min-w-48">
                <When closure={closure} />
                <span className="block text-muted sm:hidden">
                  Next: <Next closure={closure} />
                </span>
              </Td>
              <Td className="whitespace-nowrap max-sm:hidden">
                <Next closure={closure} />
              </Td>
              {edit && (
                <Td className="text-right sm:whitespace-nowrap">
                  <Button size="small" look="quiet" onClick={() => edit(closure.id)}>
                    Change <span className="sr-only">{closure.label || closureWords[closure.kind]}</span>
                  </Button>
                  <Button size="small" look="quiet" onClick={() => onRemove(closure)}>
                    Remove <span className="sr-only">{closure.label || closureWords[closure.kind]}</span>
                  </Button>
                </Td>
              )}
            </tr>
          ))}
        </tbody>
      </Table>
    </>
  );
}

function When({ closure }: { closure: Closure }) {
  const { clock } = useFormats();
  const said = sayRecurrence(closure, clock);
  return <>{said.charAt(0).toUpperCase() + said.slice(1)}</>;
}

function Next({ closure }: { closure: Closure }) {
  const { zone, today, date, dateSpan } = useFormats();
  const [next] = nextTimes(closure, zone, instantOf(today(), 0, zone), 1);
  if (!next) return <span className="text-muted">over</span>;
  if (closure.minutes % 1440 === 0 && closure.startsLocal.endsWith('T00:00')) {
    const [first, last] = [date(next.from), date(next.to.getTime() - 1)];
    return <>{first === last ? first : `${first} to ${last}`}</>;
  }
  return <>{dateSpan(next.from, next.to)}</>;
}
