import type { StagePreview } from '../model/sheet-stages.ts';
import { PhaseBar } from '#src/ui/phase-bar.tsx';

/** The whole chain as one line of bars, each as wide as its stage lasts by its shortest way. */
export function StageChain({ stages }: { stages: readonly StagePreview[] }) {
  return (
    <span aria-hidden="true" className="flex w-full items-center gap-1">
      {stages.map((stage) => (
        <span key={stage.key} className="min-w-1.5" style={{ flex: `${Math.max(stage.least, 1)} 1 0` }}>
          <PhaseBar pieces={stage.phases.map(({ kind, minutes }) => ({ kind, size: minutes }))} className="!h-4" />
        </span>
      ))}
    </span>
  );
}
