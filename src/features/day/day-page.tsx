import { useState } from 'react';
import { createPortal } from 'react-dom';
import { formatDay } from '#src/lib/formats.ts';
import { useIsNarrow, useMedia } from '#src/lib/use-media.ts';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { AirStrip } from './air/air-strip.tsx';
import { ChangedAir } from './air/changed-air.tsx';
import { DayBody } from './day-body.tsx';
import { BoardSkeleton } from './day-states.tsx';
import { DayToolbar } from './day-toolbar.tsx';
import { DayCaution, Legend } from './legend.tsx';
import { step } from './model/day-range.ts';
import { ChosenStage } from './panel/chosen-stage.tsx';
import { CompareDialog } from './plan/compare-dialog.tsx';
import { PlanActions } from './plan/plan-actions.tsx';
import { PlanState } from './plan/plan-state.tsx';
import { RunStrip } from './plan/run-strip.tsx';
import { UnplacedTray } from './plan/unplaced-tray.tsx';
import { DaySheet } from './print/day-sheet.tsx';
import { usePrinting } from './print/use-printing.ts';
import { RefusedNote } from './refused-note.tsx';
import { zoomed, type Zoom } from './timeline/scale.ts';
import { useBoothDay } from './use-booth-day.ts';
import { useDayKeys } from './use-day-keys.ts';
import './timeline/timeline.css';
import './timeline/bars.css';
import './print/print.css';

/** The booth day: what is where, when and with whom, and all that a lead does about it. */
export function Component() {
  const booth = useBoothDay();
  const { shop, formats, today, link, setLink, canPlan, days, day, view, moves, planning } = booth;
  const [zoom, setZoom] = useState<Zoom>(1);
  const [comparing, setComparing] = useState(false);
  const narrow = useIsNarrow();
  const roomy = useMedia('(min-width: 75rem)');
  const printedAt = usePrinting();
  useDayKeys({
    undo: moves.undo,
    redo: moves.redo,
    earlier: () => setLink({ date: step(link.date, link.span, -1) }),
    later: () => setLink({ date: step(link.date, link.span, 1) }),
    today: () => setLink({ date: today }),
    larger: () => setZoom(zoomed(zoom, 1)),
    smaller: () => setZoom(zoomed(zoom, -1)),
  });
  const { refused } = moves;
  return (
    <Page
      width="wide"
      title={titleOf(days, today)}
      about={view && <PlanState view={view} formats={formats} />}
      actions={
        view &&
        canPlan && <PlanActions shopId={shop.id} view={view} planning={planning} onCompare={() => setComparing(true)} />
      }
    >
      <DayToolbar {...{ link, today, narrow, view, canPlan, moves, zoom }} onZoom={setZoom} onLink={setLink} />
      {view && <AirStrip view={view} formats={formats} />}
      {view && view.posted.changedAir.length > 0 && (
        <ChangedAir view={view} formats={formats} replan={canPlan ? () => planning.start('all') : null} />
      )}
      <RunStrip planning={planning} skew={booth.skew} />
      {refused && refused.move.stageId !== link.stage && (
        <RefusedNote refused={refused} bars={view?.bars ?? []} onClose={moves.forgive} />
      )}
      {day.error && (
        <ErrorNote
          error={day.error}
          what={view ? 'The board could not be brought up to date.' : 'The booth day could not be loaded.'}
          retry={() => void day.refetch()}
        />
      )}
      {view ? (
        <DayBody booth={booth} view={view} narrow={narrow} zoom={zoom} onZoom={setZoom}>
          <ChosenStage
            {...{ view, formats, moves, canPlan, movable: booth.movable }}
            stageId={link.stage}
            beside={roomy && !narrow}
            onChoose={(stage) => setLink({ stage })}
            onClose={() => setLink({ stage: null })}
          />
        </DayBody>
      ) : (
        !day.error && <BoardSkeleton />
      )}
      {view && <UnplacedTray unplaced={view.unplaced} />}
      <footer className="flex flex-col gap-3 border-t border-line pt-3">
        <Legend />
        <DayCaution />
      </footer>
      {comparing && view?.draft && (
        <CompareDialog shopId={shop.id} draft={view.draft} formats={formats} onClose={() => setComparing(false)} />
      )}
      {printedAt !== null &&
        view &&
        createPortal(
          <DaySheet {...{ view, days, printedAt, say: booth.say }} zone={shop.timeZone} shopName={shop.name} />,
          document.body,
        )}
    </Page>
  );
}

const titleOf = (days: readonly string[], today: string): string => {
  const [first = today, last = first] = [days[0], days.at(-1)];
  return first === last ? formatDay(first, 'long', today) : `${formatDay(first)} to ${formatDay(last, 'short', today)}`;
};
