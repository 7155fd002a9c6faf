import { fractionAt } from '../model/axis.ts';
import { numbersOf } from '../model/describe.ts';
import { hintAt } from '../model/landing.ts';
import { windowOf } from '../model/window-of.ts';
import { BarBody } from './bar-body.tsx';
import { useBoardContext, useBoardData } from './board-context.ts';
import { useBoard } from './board-store.ts';
import type { Layout } from './layout.ts';
import { percent } from './percent.ts';

/** While a bar is dragged: its window lit across the rows, and the bar where it would land with what is in the way there. */
export function DragView({ layout }: { layout: Layout }) {
  const { view, axis } = useBoardData();
  const { store, sayTime, sayHint } = useBoardContext();
  const dragged = useBoard(store, (state) => state.dragged);
  if (!dragged) return null;
  const { item, start, placeId } = dragged;
  const window = windowOf(item.members);
  const from = window.earliest === null ? 0 : fractionAt(axis, Date.parse(window.earliest));
  const to = window.latest === null ? 1 : fractionAt(axis, Date.parse(window.latest));
  const left = fractionAt(axis, start);
  const width = fractionAt(axis, start + item.to - item.from) - left;
  const line = layout.lines.find((one) => one.key === placeId);
  const hint = hintAt(view, item.members[0], placeId, start);
  return (
    <>
      <div className="landing" style={{ left: percent(from), width: percent(Math.max(0, to - from)) }} />
      <div
        className={hint ? 'ghost bar bar-stage bar-dragged bar-clash' : 'ghost bar bar-stage bar-dragged'}
        style={{ left: percent(left), width: percent(width), top: (line?.top ?? 0) + 5 }}
      >
        <div className="bar-label">
          <span className="drag-badge">
            <b>{sayTime(start)}</b> {numbersOf(item.members)}
            {hint && <em> {sayHint(hint)}</em>}
          </span>
        </div>
        <BarBody item={item} />
        <div className="bar-window" />
      </div>
    </>
  );
}
