import type { Drawn } from '../model/board.ts';
import { numbersOf } from '../model/describe.ts';
import { hintAt } from '../model/landing.ts';
import { BarBody } from './bar-body.tsx';
import { useBoardContext, useBoardData } from './board-context.ts';

type Props = { item: Drawn; start: number; placeId: string };

/** The bar under the pointer: where it would land, and what is plainly in the way there. */
export function DragView({ item, start, placeId }: Props) {
  const { view } = useBoardData();
  const { sayTime, sayHint } = useBoardContext();
  const hint = hintAt(view, item.members[0], placeId, start);
  return (
    <div className={hint ? 'bar bar-stage bar-dragged bar-clash' : 'bar bar-stage bar-dragged'}>
      <div className="bar-label">
        <span className="drag-badge">
          <b>{sayTime(start)}</b> {numbersOf(item.members)}
          {hint && <em> {sayHint(hint)}</em>}
        </span>
      </div>
      <BarBody item={item} />
      <div className="bar-window" />
    </div>
  );
}
