import type { UseQueryResult } from '@tanstack/react-query';
import type { ReplyOf } from '#contracts/endpoint.ts';
import type { listJobs } from '#contracts/jobs.ts';
import { cx } from '#src/lib/cx.ts';
import { may, useShop } from '#src/lib/session.ts';
import { useIsNarrow } from '#src/lib/use-media.ts';
import { Button } from '#src/ui/button.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Skeleton } from '#src/ui/skeleton.tsx';
import { pagesOf, type ListLink } from '../model/list-link.ts';
import { JobCards } from './job-cards.tsx';
import { NewJobButton } from './new-job-button.tsx';
import { JobsTable } from './jobs-table.tsx';
import { Pager } from './pager.tsx';

type Change = (part: Partial<ListLink>) => void;
type JobsFoundProps = { found: UseQueryResult<ReplyOf<typeof listJobs>>; link: ListLink; change: Change };

/** What the server found: rows, none, not yet, or why not. Rows stay in sight when asking again fails. */
export function JobsFound({ found, link, change }: JobsFoundProps) {
  const isNarrow = useIsNarrow();
  const { data, error, isPlaceholderData, refetch } = found;
  const note = error && (
    <ErrorNote
      error={error}
      what="The jobs could not be loaded."
      {...(data ? { kept: 'The list below is as it was.' } : {})}
      retry={() => void refetch()}
    />
  );
  if (!data) return note ?? <RowsToCome />;
  if (data.rows.length === 0) return note ?? <NoJobs link={link} total={data.total} size={data.size} change={change} />;
  const Rows = isNarrow ? JobCards : JobsTable;
  return (
    <div className="flex flex-col gap-3">
      {note}
      <div
        className={cx('min-w-0 transition-opacity', isPlaceholderData && 'opacity-60')}
        aria-busy={isPlaceholderData}
      >
        <Rows rows={data.rows} sort={link.sort} onSort={(sort) => change({ sort })} />
      </div>
      <Pager
        page={data.page}
        size={data.size}
        total={data.total}
        shown={data.rows.length}
        onPage={(page) => change({ page })}
      />
    </div>
  );
}

const RowsToCome = () => (
  <div role="status" className="card flex flex-col gap-px p-3">
    <span className="sr-only">Loading jobs</span>
    {Array.from({ length: 8 }, (_, i) => (
      <div key={i} className="flex items-center gap-6 py-2">
        <Skeleton className="h-4 w-10" />
        <Skeleton className="h-4 w-1/4" />
        <Skeleton className="h-5 w-20" />
        <Skeleton className="h-4 grow" />
      </div>
    ))}
  </div>
);

const reasons: Record<ListLink['state'], string> = {
  open: 'No open jobs',
  late: 'Nothing is late',
  waiting: 'Nothing waits for a plan',
  planned: 'No job is planned and not begun',
  running: 'No job is running',
  done: 'No job is done yet',
  withdrawn: 'No job was withdrawn',
  all: 'No jobs yet',
};

type NoJobsProps = { link: ListLink; total: number; size: number; change: Change };

function NoJobs({ link, total, size, change }: NoJobsProps) {
  const { role } = useShop();
  if (total > 0) {
    const last = pagesOf(total, size);
    return (
      <EmptyState
        title={`The list ends with page ${last}`}
        action={<Button onClick={() => change({ page: last })}>To the last page</Button>}
      />
    );
  }
  if (link.q)
    return (
      <EmptyState
        title={`Nothing found for “${link.q}”`}
        action={
          <>
            {link.state !== 'all' && <Button onClick={() => change({ state: 'all' })}>Search all jobs</Button>}
            <Button onClick={() => change({ q: undefined })}>Clear the search</Button>
          </>
        }
      >
        The search looks at numbers, titles and vehicles.
      </EmptyState>
    );
  const isStart = link.state === 'open' || link.state === 'all';
  return (
    <EmptyState title={reasons[link.state]} action={isStart && may.keepJobs(role) ? <NewJobButton /> : undefined}>
      {isStart && 'A job is made from a process sheet; it then waits here to be planned on the booth day.'}
    </EmptyState>
  );
}
