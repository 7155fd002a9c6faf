import { Link } from 'react-router-dom';
import type { JobRow } from '#contracts/jobs.ts';
import { paths } from '#src/app/paths.ts';
import { useFormats } from '#src/lib/session.ts';
import { Table, Td, Th } from '#src/ui/table.tsx';
import { StateMark } from '../job-state.tsx';
import { nextSort, sortedBy, type Sort, type SortKey } from '../model/list-link.ts';
import { NextCell, PromiseCell } from './job-cells.tsx';
import { StageSteps } from './stage-steps.tsx';

type JobsTableProps = { rows: readonly JobRow[]; sort: Sort; onSort: (sort: Sort) => void };

export function JobsTable({ rows, sort, onSort }: JobsTableProps) {
  const head = (key: SortKey, text: string) => (
    <Th sort={sortedBy(sort, key)} onSort={() => onSort(nextSort(sort, key))}>
      {text}
    </Th>
  );
  return (
    <Table label="Jobs">
      <thead>
        <tr>
          {head('number', 'No.')}
          {head('title', 'Job')}
          <Th>State</Th>
          <Th>Stages</Th>
          <Th>Now or next</Th>
          {head('release', 'Arrives')}
          {head('promise', 'Promise')}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <Row key={row.id} row={row} />
        ))}
      </tbody>
    </Table>
  );
}

function Row({ row }: { row: JobRow }) {
  const { date } = useFormats();
  return (
    // The link in the title spreads over the whole row, so that a click anywhere opens the job.
    <tr className="relative hover:bg-paper">
      <Td className="figures font-semibold">{row.number}</Td>
      <Td className="min-w-48">
        <Link
          to={paths.job(row.id)}
          className="font-semibold after:absolute after:inset-0 hover:underline focus-visible:outline-offset-4"
        >
          {row.title}
        </Link>
        {row.vehicle && <span className="block text-xs text-muted">{row.vehicle}</span>}
      </Td>
      <Td>
        <StateMark state={row.state} />
      </Td>
      <Td>
        <StageSteps done={row.stagesDone} total={row.stagesTotal} />
      </Td>
      <Td>
        <NextCell row={row} />
      </Td>
      <Td className="whitespace-nowrap">
        <time dateTime={row.releaseAt}>{date(row.releaseAt)}</time>
      </Td>
      <Td>
        <PromiseCell row={row} />
      </Td>
    </tr>
  );
}
