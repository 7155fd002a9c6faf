import { CircleCheck } from 'lucide-react';
import type { SheetBody } from '#contracts/sheets.ts';
import type { Fault } from '../model/faults.ts';
import { useEditor } from './editor-context.ts';
import { FaultIcon, FaultWords } from './fault-place.tsx';

/** Every fault of the sheet; each leads to its field. */
export function FaultsPanel({ onJump }: { onJump: (fault: Fault) => void }) {
  const { faults, body } = useEditor();
  const sorted = faults.toSorted((a, b) => Number(a.severity === 'warn') - Number(b.severity === 'warn'));
  return (
    <section aria-labelledby="sheet-faults" className="card flex flex-col gap-2 p-4">
      <h2 id="sheet-faults">{headOf(faults)}</h2>
      {sorted.length === 0 ? (
        <p className="flex items-start gap-2 text-muted">
          <CircleCheck size={16} className="mt-0.5 shrink-0 text-moss" aria-hidden="true" />
          Windows, flashes, heat limits and who and where agree with the data sheets and the shop.
        </p>
      ) : (
        <ul className="flex max-h-96 flex-col gap-0.5 overflow-y-auto">
          {sorted.map((fault) => (
            <li key={[fault.code, fault.stage, fault.way, fault.text].join('|')}>
              <button
                type="button"
                onClick={() => onJump(fault)}
                className="flex w-full items-start gap-2 rounded px-1.5 py-1.5 text-left text-[0.8125rem] hover:bg-paper"
              >
                <FaultIcon severity={fault.severity} />
                <span>
                  <b>{whereOf(body, fault)}</b> <FaultWords fault={fault} />
                </span>
              </button>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}

function headOf(faults: readonly Fault[]): string {
  const stops = faults.filter(({ severity }) => severity === 'stop').length;
  const warns = faults.length - stops;
  if (faults.length === 0) return 'Nothing to mend';
  return [stops > 0 ? `${stops} to mend before it can be saved` : '', warns > 0 ? `${warns} to look at` : '']
    .filter(Boolean)
    .join(', ');
}

function whereOf(body: SheetBody, { stage, way }: Fault): string {
  const found = body.stages.find(({ key }) => key === stage);
  if (!found) return 'Sheet:';
  const label = found.ways.length > 1 ? found.ways.find(({ id }) => id === way)?.label : undefined;
  return `${[found.title || 'Stage', label].filter(Boolean).join(', ')}:`;
}
