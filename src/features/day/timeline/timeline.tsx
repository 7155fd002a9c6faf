import { memo, useCallback, useMemo, useRef } from 'react';
import type { Drawn } from '../model/board.ts';
import { closedTimes, type ClosedTime } from '../model/closed-times.ts';
import { useSame } from '../use-same.ts';
import { useBoardContext, useBoardData } from './board-context.ts';
import { useBoard } from './board-store.ts';
import { DragView } from './drag-view.tsx';
import { Grid, Hours } from './hours.tsx';
import { Closed } from './lane.tsx';
import { layOut, linesBetween } from './layout.ts';
import { GroupHeading, Line } from './line.tsx';
import { rowsOf } from './rows.ts';
import { scaleOf, zoomed, type Zoom } from './scale.ts';
import { headerOf, NAMES } from './sizes.ts';
import { useArrows } from './use-arrows.ts';
import { useDrag } from './use-drag.ts';
import { useFold } from './use-fold.ts';
import { useKeepCentre } from './use-keep-centre.ts';
import { useNowLine } from './use-now-line.ts';
import { useViewport } from './use-viewport.ts';
import { useWheelZoom } from './use-wheel-zoom.ts';

export type TimelineProps = {
  board: readonly Drawn[];
  people: boolean;
  zoom: Zoom;
  onZoom: (zoom: Zoom) => void;
  /** Server's clock less the browser's, milliseconds. */
  skew: number;
  movable: boolean;
  onDrop: (item: Drawn, start: number, placeId: string) => void;
  onNudge: (item: Drawn, minutes: number) => void;
};

const LEAST_LANE = 320;
const none: readonly ClosedTime[] = [];

function byRow(times: readonly ClosedTime[]): Map<string | null, ClosedTime[]> {
  const rows = new Map<string | null, ClosedTime[]>();
  for (const time of times) rows.set(time.rowId, [...(rows.get(time.rowId) ?? []), time]);
  return rows;
}

/** The booth day as rows over time. Draws only what is near the visible part of it, so that its size does not matter. */
export const Timeline = memo(function Timeline(props: TimelineProps) {
  const { board, people, zoom, onZoom, movable, onDrop } = props;
  const { view, axis } = useBoardData();
  const { store, sayTime } = useBoardContext();
  const box = useRef<HTMLDivElement>(null);
  const viewport = useViewport(box);
  const rows = useSame(rowsOf(view, people));
  const { folded, toggle } = useFold();
  const layout = useMemo(() => layOut(rows, board, folded), [rows, board, folded]);
  const times = useSame(closedTimes(view));
  const closed = useMemo(() => byRow(times), [times]);
  const laneWidth = Math.max(LEAST_LANE, viewport.width - NAMES) * zoom;
  const { slotMinutes } = scaleOf(axis, laneWidth, 1);
  const header = headerOf(axis);
  const holdAt = useKeepCentre(box, laneWidth);
  useWheelZoom(
    box,
    useCallback((by) => onZoom(zoomed(zoom, by)), [onZoom, zoom]),
    holdAt,
  );
  useNowLine(box, axis, props.skew, sayTime);
  useDrag(box, { board, axis, layout, laneWidth, movable, store, onDrop });
  const onKeyDown = useArrows(box, { board, layout, axis, laneWidth }, props.onNudge);
  const focusStop = useBoard(store, (state) => state.focusStop);
  const stopRow = board.find((item) => item.id === focusStop)?.rowId;
  const near = linesBetween(layout, viewport.top - header, viewport.bottom - header);
  // What Tab reaches is there however far one has scrolled.
  const stop = layout.lines.find((line) => line.key === stopRow);
  const lines = stop && !near.includes(stop) ? [...near, stop] : near;
  const [from, to] = [(viewport.left - NAMES) / laneWidth, viewport.right / laneWidth];
  return (
    <div
      ref={box}
      className="timeline"
      role="group"
      aria-label="Booth day"
      tabIndex={-1}
      style={{ scrollPadding: `${header + 4}px 8px 8px ${NAMES + 8}px` }}
      onKeyDown={onKeyDown}
    >
      <div className="timeline-head" style={{ width: NAMES + laneWidth, height: header }}>
        <div className="timeline-corner" style={{ width: NAMES }}>
          Place
        </div>
        <div className="timeline-hours" style={{ width: laneWidth }}>
          <Hours axis={axis} slotMinutes={slotMinutes} />
        </div>
      </div>
      <div className="timeline-body" style={{ width: NAMES + laneWidth, height: layout.height }}>
        <div className="layer" style={{ left: NAMES, width: laneWidth }}>
          <Grid axis={axis} slotMinutes={slotMinutes} />
          <Closed times={closed.get(null) ?? none} axis={axis} />
        </div>
        {lines.map((line) =>
          line.kind === 'heading' ? (
            <GroupHeading key={line.key} line={line} onToggle={toggle} />
          ) : (
            <Line
              key={line.key}
              {...{ line, axis, laneWidth, movable }}
              closed={closed.get(line.row.id) ?? none}
              from={line === stop ? -Infinity : from}
              to={line === stop ? Infinity : to}
            />
          ),
        )}
        <div className="layer layer-over" style={{ left: NAMES, width: laneWidth }}>
          <DragView layout={layout} />
        </div>
      </div>
    </div>
  );
});

export default Timeline;
