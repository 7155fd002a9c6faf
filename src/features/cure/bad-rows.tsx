import type { TraceHead } from './model/trace-engine.ts';
import { Table, Td, Th } from '#src/ui/table.tsx';
import { Card } from './sections.tsx';

/** Line by line what could not be used. */
export function BadRows({ table: { bad, badCount } }: { table: TraceHead }) {
  if (badCount === 0) return null;
  return (
    <Card title={badCount === 1 ? 'One line with a fault' : `${badCount.toLocaleString('en-GB')} lines with a fault`}>
      <p className="text-muted">The readings named here were left out; all others count.</p>
      <Table label="Lines with a fault" className="max-h-64">
        <thead>
          <tr>
            <Th number>Line</Th>
            <Th className="w-full">What is wrong</Th>
          </tr>
        </thead>
        <tbody>
          {bad.map(({ line, what }, i) => (
            <tr key={i}>
              <Td number>{line}</Td>
              <Td className="break-words">{what}</Td>
            </tr>
          ))}
        </tbody>
      </Table>
      {badCount > bad.length && <p className="text-xs text-muted">The first {bad.length} are shown.</p>}
    </Card>
  );
}
