import type { JobRow } from '#contracts/jobs.ts';
import { useFormats } from '#src/lib/session.ts';
import { LateMark } from '../job-state.tsx';

/** The promise, marked where the job is late for it, with the end that is planned. */
export function PromiseCell({ row }: { row: JobRow }) {
  const { dateTime } = useFormats();
  if (row.promiseAt === null) return <span className="text-muted">none</span>;
  return (
    <span className="flex flex-col">
      <span className="flex flex-wrap items-center gap-x-2">
        <time dateTime={row.promiseAt} className="whitespace-nowrap">
          {dateTime(row.promiseAt)}
        </time>
        {row.late && <LateMark />}
      </span>
      {row.endsAt !== null && row.state !== 'done' && (
        <span className="text-xs whitespace-nowrap text-muted">
          ends <time dateTime={row.endsAt}>{dateTime(row.endsAt)}</time>
        </span>
      )}
    </span>
  );
}

/** What comes next, when and where. */
export function NextCell({ row }: { row: JobRow }) {
  const { dateTime } = useFormats();
  if (row.next) {
    const { title, startsAt, placeName } = row.next;
    return (
      <span className="flex flex-col">
        <span>{title}</span>
        <span className="text-xs text-muted">
          <time dateTime={startsAt}>{dateTime(startsAt)}</time> · {placeName}
        </span>
      </span>
    );
  }
  return <span className="text-muted">{nothingNext(row)}</span>;
}

function nothingNext({ state, stagesDone, stagesTotal }: JobRow): string {
  if (state === 'done' || state === 'withdrawn') return '';
  return state === 'running' && stagesDone === stagesTotal - 1 ? 'last stage runs' : 'not planned yet';
}
