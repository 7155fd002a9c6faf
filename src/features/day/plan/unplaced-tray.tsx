import { Link } from 'react-router-dom';
import type { DayView } from '#contracts/day.ts';
import { paths } from '#src/app/paths.ts';

/** Jobs without a place in the plan that is shown, each with why. */
export function UnplacedTray({ unplaced }: { unplaced: DayView['unplaced'] }) {
  if (unplaced.length === 0) return null;
  return (
    <details open className="card no-print">
      <summary className="px-4 py-2.5 font-semibold">
        {unplaced.length === 1 ? 'One job has no place yet' : `${unplaced.length} jobs have no place yet`}
      </summary>
      <ul className="divide-y divide-line border-t border-line">
        {unplaced.map((job) => (
          <li key={job.jobId} className="flex flex-wrap gap-x-4 gap-y-0.5 px-4 py-2">
            <Link className="link figures" to={paths.job(job.jobId)}>
              {job.jobNumber}
            </Link>
            <span className="min-w-48">{job.jobTitle}</span>
            <span className="min-w-0 grow basis-80 text-muted">
              {job.stageTitle && `${job.stageTitle}: `}
              {job.reason ?? 'Not planned yet. “Plan the rest” looks for a place.'}
            </span>
          </li>
        ))}
      </ul>
    </details>
  );
}
