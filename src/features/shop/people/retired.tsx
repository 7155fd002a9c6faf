import { bringBackPerson, type Person } from '#contracts/people.ts';
import { may, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { useDeed } from './people-query.ts';

/** Who is off the roster. Their work stays on record. */
export function Retired({ people }: { people: readonly Person[] }) {
  const shop = useShop();
  const back = useDeed(bringBackPerson, () => undefined);
  return (
    <details className="flex flex-col gap-2">
      <summary className="min-h-control cursor-pointer py-2 font-semibold">Off the roster ({people.length})</summary>
      {back.isError && <ErrorNote error={back.error} what="Nobody was brought back." />}
      <ul className="card divide-y divide-line">
        {people.map((person) => (
          <li key={person.id} className="flex items-center justify-between gap-3 px-3 py-2">
            {person.name}
            {may.setUp(shop.role) && (
              <Button
                size="small"
                look="quiet"
                busy={back.isPending && back.variables.params.personId === person.id}
                onClick={() =>
                  back.mutate({ params: { shopId: shop.id, personId: person.id }, body: { version: person.version } })
                }
              >
                Bring back<span className="sr-only"> {person.name}</span>
              </Button>
            )}
          </li>
        ))}
      </ul>
    </details>
  );
}
