import { lazy, Suspense, useEffect, useMemo, type ReactNode } from 'react';
import type { DayView } from '#contracts/day.ts';
import type { Axis } from './model/axis.ts';
import type { Drawn } from './model/board.ts';
import { BoardSkeleton } from './day-states.tsx';
import { BoardContext, BoardDataContext, type BoardContextValue } from './timeline/board-context.ts';
import type { TimelineProps } from './timeline/timeline.tsx';

// The calendar library is heavy and of no use to a phone: fetched when a timeline is drawn.
const Timeline = lazy(() => import('./timeline/timeline.tsx'));

type Props = TimelineProps & {
  view: DayView;
  axis: Axis;
  board: readonly Drawn[];
  words: BoardContextValue;
  selected: string | null;
  panel: ReactNode;
};

/** The timeline with what its bars need, and beside it the stage that was chosen. */
export function BoardView({ view, axis, words, selected, panel, ...timeline }: Props) {
  const data = useMemo(() => ({ view, axis }), [view, axis]);
  useEffect(() => words.store.set({ selected }), [words, selected]);
  return (
    <BoardContext value={words}>
      <BoardDataContext value={data}>
        <div className="flex items-start gap-4">
          <div className="min-w-0 grow">
            <Suspense fallback={<BoardSkeleton />}>
              <Timeline {...timeline} />
            </Suspense>
          </div>
          {panel}
        </div>
      </BoardDataContext>
    </BoardContext>
  );
}
