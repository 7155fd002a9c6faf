import { Link } from 'react-router-dom';
import type { JobRow } from '#contracts/jobs.ts';
import { paths } from '#src/app/paths.ts';
import { Select } from '#src/ui/select.tsx';
import { StateMark } from '../job-state.tsx';
import type { Sort } from '../model/list-link.ts';
import { NextCell, PromiseCell } from './job-cells.tsx';
import { StageSteps } from './stage-steps.tsx';

type JobCardsProps = { rows: readonly JobRow[]; sort: Sort; onSort: (sort: Sort) => void };

const orders: Record<Sort, string> = {
  promise: 'Promise, soonest first',
  '-promise': 'Promise, latest first',
  '-number': 'Newest first',
  number: 'Oldest first',
  title: 'Title, A to Z',
  '-title': 'Title, Z to A',
  release: 'Arrival, soonest first',
  '-release': 'Arrival, latest first',
};

/** The list where there is no room for columns. */
export function JobCards({ rows, sort, onSort }: JobCardsProps) {
  return (
    <div className="flex flex-col gap-3">
      <Select label="Order" hideLabel value={sort} onChange={(event) => onSort(event.target.value as Sort)}>
        {Object.entries(orders).map(([value, text]) => (
          <option key={value} value={value}>
            {text}
          </option>
        ))}
      </Select>
      <ul className="flex flex-col gap-2">
        {rows.map((row) => (
          <li key={row.id} className="card relative flex flex-col gap-2.5 p-3.5">
            <div className="flex items-start justify-between gap-3">
              <div className="min-w-0">
                <Link to={paths.job(row.id)} className="text-base font-bold after:absolute after:inset-0">
                  <span className="figures">{row.number}</span> {row.title}
                </Link>
                {row.vehicle && <p className="truncate text-xs text-muted">{row.vehicle}</p>}
              </div>
              <StateMark state={row.state} />
            </div>
            <StageSteps done={row.stagesDone} total={row.stagesTotal} />
            <dl className="grid grid-cols-2 gap-3">
              <div>
                <dt className="text-xs text-muted">Now or next</dt>
                <dd>
                  <NextCell row={row} />
                </dd>
              </div>
              <div>
                <dt className="text-xs text-muted">Promise</dt>
                <dd>
                  <PromiseCell row={row} />
                </dd>
              </div>
            </dl>
          </li>
        ))}
      </ul>
    </div>
  );
}
