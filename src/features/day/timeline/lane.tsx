import { memo } from 'react';
import { fractionAt, type Axis } from '../model/axis.ts';
import type { ClosedTime } from '../model/closed-times.ts';
import { BarView } from './bar-view.tsx';
import { useBoardData } from './board-context.ts';
import { CircuitStrip } from './circuit-strip.tsx';
import type { Hung } from './layout.ts';
import { mayMove } from './may-move.ts';
import { percent } from './percent.ts';
import type { TimelineRow } from './rows.ts';

/** Time in which something is not used, behind the bars. Left out where it lies in hidden hours altogether. */
export function Closed({ times, axis }: { times: readonly ClosedTime[]; axis: Axis }) {
  return times.map(({ id, from, to, kind, label }) => {
    const left = fractionAt(axis, from);
    const width = fractionAt(axis, to) - left;
    if (width <= 0) return null;
    return (
      <div key={id} className={`closed closed-${kind}`} style={{ left: percent(left), width: percent(width) }}>
        {label && <span className="closed-label">{label}</span>}
      </div>
    );
  });
}

type Props = {
  row: TimelineRow;
  bars: readonly Hung[];
  closed: readonly ClosedTime[];
  axis: Axis;
  /** The stretch worth drawing, 0 to 1. */
  from: number;
  to: number;
  movable: boolean;
};

/** One row's bars over its closed times. */
export const Lane = memo(function Lane({ row, bars, closed, axis, from, to, movable }: Props) {
  if (row.kind === 'circuit') return <CircuitLane id={row.id} />;
  return (
    <>
      <Closed times={closed} axis={axis} />
      {bars.map(({ item, top }) => {
        const left = fractionAt(axis, item.from);
        const right = fractionAt(axis, item.to);
        if (right < from || left > to) return null;
        return (
          <div
            key={item.id}
            className={movable && mayMove(item) ? 'bar-carrier bar-movable' : 'bar-carrier'}
            style={{ left: percent(left), width: percent(right - left), top }}
          >
            <BarView item={item} />
          </div>
        );
      })}
    </>
  );
});

function CircuitLane({ id }: { id: string }) {
  const { view, axis } = useBoardData();
  const circuit = view.circuits.find((c) => c.id === id);
  return circuit ? <CircuitStrip view={view} circuit={circuit} axis={axis} /> : null;
}
