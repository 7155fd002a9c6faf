import { Link } from 'react-router-dom';
import { paths } from '#src/app/paths.ts';
import { Button } from '#src/ui/button.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';

/** The board's shape while it is on its way: rows with bars here and there. */
export function BoardSkeleton() {
  return (
    <div role="status" className="card overflow-hidden">
      <span className="sr-only">Loading the booth day</span>
      <div className="h-9 border-b border-line" />
      {[12, 30, 8, 45, 22, 60, 15, 38].map((left, i) => (
        <div key={left} className="flex h-13 items-center border-b border-line">
          <div className="w-43 shrink-0 px-3">
            <Skeleton className="h-4 w-20" />
          </div>
          <div className="relative h-5 grow">
            <div className="absolute h-5" style={{ left: `${left}%`, width: `${12 + ((i * 7) % 16)}%` }}>
              <Skeleton className="size-full" />
            </div>
          </div>
        </div>
      ))}
    </div>
  );
}

/** No booths, no rows: the shop has not been set up. */
export const NoPlaces = () => (
  <div className="card">
    <EmptyState title="No booths yet">
      Here stands the booth day: every booth, prep station, rack and lamp as a row, every stage of a job as a bar. An
      owner of the shop enters the places first.
    </EmptyState>
  </div>
);

type EmptyProps = { canPlan: boolean; unplaced: number; onPlan: () => void };

/** The rows are there but nothing is booked on them. */
export function NothingBooked({ canPlan, unplaced, onPlan }: EmptyProps) {
  if (!canPlan) return <p className="card px-4 py-3 text-muted">Nothing is booked for this time.</p>;
  return (
    <div className="card flex flex-wrap items-center justify-between gap-3 px-4 py-3">
      <p>
        <b>Nothing is booked for this time.</b>{' '}
        <span className="text-muted">
          {unplaced > 0
            ? `${unplaced} ${unplaced === 1 ? 'job waits' : 'jobs wait'} for a place.`
            : 'Stages appear here as bars once a job has been planned.'}
        </span>
      </p>
      {unplaced > 0 ? (
        <Button look="primary" onClick={onPlan}>
          Plan the rest
        </Button>
      ) : (
        <Button asChild>
          <Link to={paths.newJob()}>New job</Link>
        </Button>
      )}
    </div>
  );
}
