import { Plus } from 'lucide-react';
import type { Coating } from '#contracts/coatings.ts';
import type { Phase, SheetStage, Way } from '#contracts/sheets.ts';
import { Button } from '#src/ui/button.tsx';
import { PhaseBar } from '#src/ui/phase-bar.tsx';
import { putPhases } from '../model/body-edits.ts';
import { phase as newPhase, sourced } from '../model/phases.ts';
import type { Below } from '../model/way-templates.ts';
import { useEditor } from './editor-context.ts';
import { PhaseRow } from './phase-row.tsx';

type PhasesTableProps = { stage: SheetStage; way: Way; below: Below };

/** The phases of a way in order, each with its minutes and who has to be there. */
export function PhasesTable({ stage, way, below }: PhasesTableProps) {
  const { edit, coatings, readOnly } = useEditor();
  const own = coatings.find(({ id }) => id === stage.coatingId) ?? null;
  const coating = own ?? below.coating;
  const { length } = way.phases;
  return (
    <fieldset className="flex min-w-0 flex-col gap-2">
      <legend className="mb-2 font-bold">Phases</legend>
      <PhaseBar pieces={way.phases.map(({ kind, minutes }) => ({ kind, size: Math.max(1, minutes) }))} />
      <ol className="flex flex-col divide-y divide-line">
        {way.phases.map((phase, i) => (
          <PhaseRow key={i} stage={stage} way={way} phase={phase} at={i} coating={coating} />
        ))}
      </ol>
      {!readOnly && (
        <div className="flex flex-wrap gap-2">
          <Button
            size="small"
            icon={<Plus size={14} aria-hidden="true" />}
            disabled={length >= 40}
            onClick={() => edit(putPhases(stage.key, way.id, length, [newPhase('work', 15, 'hands')]))}
          >
            Add a phase
          </Button>
          <Button
            size="small"
            icon={<Plus size={14} aria-hidden="true" />}
            disabled={length >= 39}
            onClick={() => edit(putPhases(stage.key, way.id, afterLastCoat(way), oneMoreCoat(way, coating)))}
          >
            Add a coat
          </Button>
        </div>
      )}
    </fieldset>
  );
}

const afterLastCoat = ({ phases }: Way): number => phases.findLastIndex(({ kind }) => kind === 'spray') + 1;

/** One more coat like the last, with the flash that belongs before it. */
function oneMoreCoat({ phases }: Way, coating: Coating | null): Phase[] {
  const last = phases.findLast(({ kind }) => kind === 'spray');
  const { perExtraCoat: _, ...coat } = last ?? newPhase('spray', 7, 'hands', coating ? { source: 'coat' } : {});
  return last ? [{ kind: 'flash', attendance: 'hands', ...sourced('flash-between', coating, 10) }, coat] : [coat];
}
