import { Link } from 'react-router-dom';
import { paths } from '#src/app/paths.ts';
import { useFormats } from '#src/lib/session.ts';
import { instantOf } from '#src/lib/wall-clock.ts';
import { ClosuresTable } from '../parts/closures-table.tsx';
import { nextTimes } from '../parts/recurrence-dates.ts';
import type { Hours } from './model/month.ts';

/** What lies ahead by its next time, and what is over. */
export function ClosuresList({ data, edit }: { data: Hours; edit: ((id: string) => void) | undefined }) {
  const { zone, today } = useFormats();
  const from = instantOf(today(), 0, zone);
  const byNext = data.closures
    .filter(({ kind }) => kind !== 'maintenance')
    .map((closure) => ({ closure, next: nextTimes(closure, zone, from, 1)[0]?.from.getTime() ?? null }))
    .toSorted((a, b) => (a.next ?? 0) - (b.next ?? 0));
  const ahead = byNext.filter(({ next }) => next !== null).map(({ closure }) => closure);
  const over = byNext.filter(({ next }) => next === null).map(({ closure }) => closure);
  return (
    <>
      {ahead.length === 0 ? (
        <p className="text-muted">No holiday, closure or breakdown lies ahead.</p>
      ) : (
        <ClosuresTable label="Holidays and closures" closures={ahead} things={data} edit={edit} />
      )}
      {over.length > 0 && (
        <details>
          <summary className="cursor-pointer font-semibold">Over: {over.length}</summary>
          <div className="pt-2">
            <ClosuresTable label="Closures that are over" closures={over} things={data} edit={edit} />
          </div>
        </details>
      )}
      <p className="text-muted">
        Maintenance that comes again stands under{' '}
        <Link to={paths.upkeep()} className="link">
          Upkeep
        </Link>
        .
      </p>
    </>
  );
}
