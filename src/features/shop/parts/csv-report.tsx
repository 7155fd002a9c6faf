import type { CsvReport } from '#contracts/csv.ts';
import { Table, Td, Th } from '#src/ui/table.tsx';

/** What a file would do, or line by line why it cannot be taken. */
export function CsvReportView({ name, report }: { name: string; report: CsvReport }) {
  const { lines, added, changed, faults } = report;
  if (lines === 0 && faults.length === 0)
    return <p role="status">{name} has a header and no lines below it. There is nothing to take.</p>;
  if (faults.length === 0)
    return (
      <p role="status">
        <strong className="break-words">{name}</strong>: {count(lines, 'line')}, {added} new, {changed} changed
        {lines > added + changed && `, ${lines - added - changed} as they are`}.
      </p>
    );
  return (
    <div className="flex flex-col gap-2">
      <p role="alert">
        <strong className="break-words">{name}</strong>: {count(faults.length, 'thing')} to put right. Nothing was
        written; correct the file and choose it again.
      </p>
      <Table label="What is wrong, by line" className="max-h-[45dvh]">
        <thead>
          <tr>
            <Th number>Line</Th>
            <Th>Column</Th>
            <Th>What is wrong</Th>
          </tr>
        </thead>
        <tbody>
          {faults.map(({ line, column, message }, at) => (
            <tr key={at}>
              <Td number>{line}</Td>
              <Td className="break-words">{column ?? 'whole line'}</Td>
              <Td>{message}</Td>
            </tr>
          ))}
        </tbody>
      </Table>
    </div>
  );
}

const count = (n: number, what: string): string => `${n} ${what}${n === 1 ? '' : 's'}`;
