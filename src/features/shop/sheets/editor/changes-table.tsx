import { Table, Td, Th } from '#src/ui/table.tsx';
import type { Change } from '../model/changes.ts';

type ChangesTableProps = { label: string; changes: readonly Change[]; before: string; after: string };

/** What differs, line by line. */
export function ChangesTable({ label, changes, before, after }: ChangesTableProps) {
  if (changes.length === 0) return <p className="text-muted">Nothing differs.</p>;
  return (
    <Table label={label} className="max-h-[50dvh]">
      <thead>
        <tr>
          <Th>Where</Th>
          <Th>{before}</Th>
          <Th>{after}</Th>
        </tr>
      </thead>
      <tbody>
        {changes.map(({ where, what, before: was, after: is }) => (
          <tr key={where + what}>
            <Td className="align-top">
              <b>{where}</b>
              <br />
              <span className="text-xs text-muted">{what}</span>
            </Td>
            <Td className="align-top">{was === null ? <Absent /> : was || <Absent />}</Td>
            <Td className="align-top">{is === null ? <Absent /> : is || <Absent />}</Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

const Absent = () => <span className="text-muted">not there</span>;
