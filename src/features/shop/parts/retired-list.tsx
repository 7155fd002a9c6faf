import { Button } from '#src/ui/button.tsx';

type RetiredListProps = {
  things: readonly { id: string; name: string }[];
  /** Absent: looked at only. */
  bringBack?: ((id: string) => void) | undefined;
  busyId: string | null;
};

/** What is out of use, out of the way until it is wanted. */
export function RetiredList({ things, bringBack, busyId }: RetiredListProps) {
  if (things.length === 0) return null;
  return (
    <details className="card px-4 py-3">
      <summary className="cursor-pointer font-semibold">Out of use: {things.length}</summary>
      <ul className="flex flex-col pt-2">
        {things.map(({ id, name }) => (
          <li key={id} className="flex min-h-control items-center justify-between gap-3 border-t border-line py-1">
            {name}
            {bringBack && (
              <Button size="small" busy={busyId === id} onClick={() => bringBack(id)}>
                Bring back <span className="sr-only">{name}</span>
              </Button>
            )}
          </li>
        ))}
      </ul>
    </details>
  );
}
