import type { ReactNode } from 'react';
import type { DayView } from '#contracts/day.ts';
import { BoardView } from './board-view.tsx';
import { NoPlaces, NothingBooked } from './day-states.tsx';
import { DayList } from './phone/day-list.tsx';
import type { Zoom } from './timeline/scale.ts';
import type { useBoothDay } from './use-booth-day.ts';

type Props = {
  booth: ReturnType<typeof useBoothDay>;
  view: DayView;
  narrow: boolean;
  zoom: Zoom;
  onZoom: (zoom: Zoom) => void;
  /** The stage that was chosen. */
  children: ReactNode;
};

/** The day as a timeline where there is room for one, as a list by place where there is not. */
export function DayBody({ booth, view, narrow, zoom, onZoom, children }: Props) {
  const { board, formats, link, days, open, axis, words, skew, movable, onDrop, onNudge } = booth;
  if (view.rows.length === 0) return <NoPlaces />;
  return (
    <>
      {view.bars.length === 0 && (
        <NothingBooked
          canPlan={booth.canPlan}
          unplaced={view.unplaced.length}
          onPlan={() => booth.planning.start('rest')}
        />
      )}
      {narrow ? (
        <>
          <DayList {...{ view, board, formats }} severalDays={days.length > 1} onOpen={open} />
          {children}
        </>
      ) : (
        <BoardView
          {...{ view, axis, board, words, zoom, onZoom, skew, movable, onDrop, onNudge }}
          people={link.people}
          selected={link.stage}
          panel={children}
        />
      )}
    </>
  );
}
