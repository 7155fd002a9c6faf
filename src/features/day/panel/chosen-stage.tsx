import type { Bar, DayView } from '#contracts/day.ts';
import type { Formats } from '#src/lib/formats.ts';
import type { Moves } from '../data/use-moves.ts';
import { StageFrame } from './stage-frame.tsx';
import { StagePanel } from './stage-panel.tsx';

type Props = {
  view: DayView;
  stageId: string | null;
  formats: Formats;
  moves: Moves;
  movable: boolean;
  canPlan: boolean;
  beside: boolean;
  onChoose: (stageId: string) => void;
  onClose: () => void;
};

/** The stage of the address, where it is on the board that is shown. */
export function ChosenStage({ view, stageId, beside, onClose, canPlan, movable, ...panel }: Props) {
  if (stageId === null) return null;
  const close = () => {
    onClose();
    // By keyboard one goes on from the bar; a dialog gives the focus back by itself.
    if (beside) document.querySelector<HTMLElement>(`[data-bar="${stageId}"]`)?.focus();
  };
  const bar = view.bars.find((one) => one.id === stageId);
  const title = bar ? `${bar.jobNumber} ${bar.title}` : 'Stage';
  return (
    <StageFrame title={title} beside={beside} onClose={close}>
      {bar ? (
        <StagePanel
          {...{ bar, view, ...panel }}
          members={view.bars.filter((one) => one.loadId === bar.loadId && one.from === bar.from)}
          fixed={fixedWords(bar, canPlan, movable)}
        />
      ) : (
        <p className="text-muted">This stage is not on the board in the time shown. It may stand on another day.</p>
      )}
    </StageFrame>
  );
}

function fixedWords(bar: Bar, canPlan: boolean, movable: boolean): string | null {
  if (!canPlan) return 'The paint lead moves stages; you can look at all of them.';
  if (bar.state !== 'planned') return 'It has begun, so it stays where it is.';
  return movable ? null : 'This is the posted plan. Switch to the draft to move stages.';
}
