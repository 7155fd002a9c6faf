import { Check, Pin, Play } from 'lucide-react';
import { memo } from 'react';
import type { Drawn } from '../model/board.ts';
import { numbersOf, wordsOf } from '../model/describe.ts';
import { BarBody, BarWindow } from './bar-body.tsx';
import { useBoardContext } from './board-context.ts';
import { useBoard } from './board-store.ts';

/** One bar: number and words above, phases, window line below. Reached by Tab once, then by arrows. */
export const BarView = memo(function BarView({ item }: { item: Drawn }) {
  const { store, describe, placeName, open } = useBoardContext();
  const selected = useBoard(store, (state) => item.members.some((bar) => bar.id === state.selected));
  const reachable = useBoard(store, (state) => state.focusStop === item.id);
  const words = describe(item);
  return (
    <div
      role="button"
      tabIndex={reachable ? 0 : -1}
      className={classesOf(item, selected)}
      data-bar={item.id}
      aria-label={words}
      aria-pressed={selected}
      title={words}
      onFocus={() => store.set({ focusStop: item.id })}
      onClick={() => open(item)}
    >
      <BarLabel item={item} where={placeName(item.members[0].placeId)} />
      <BarBody item={item} />
      {item.kind === 'stage' && <BarWindow shape={item.shape} whole={selected} />}
    </div>
  );
});

function classesOf({ kind, members: [head, ...others], rowKind }: Drawn, selected: boolean): string {
  const members = [head, ...others];
  return [
    'bar',
    `bar-${kind}`,
    rowKind === 'rack' ? 'bar-stacked' : '',
    `bar-${head.state}`,
    members.some((bar) => bar.late) ? 'bar-late' : '',
    members.some((bar) => bar.added) ? 'bar-added' : members.some((bar) => bar.posted) ? 'bar-moved' : '',
    selected ? 'bar-selected' : '',
  ]
    .filter(Boolean)
    .join(' ');
}

function BarLabel({ item, where }: { item: Drawn; where: string }) {
  const { members, shape, kind } = item;
  const [head] = members;
  return (
    <div className="bar-label" style={{ width: `${shape.labelRoom}%` }} aria-hidden="true">
      <span className={numbersOf(members).length > 3 ? 'bar-label-text long-number' : 'bar-label-text'}>
        <b>{numbersOf(members)}</b>
        {kind === 'stage' && head.state === 'done' && <Check className="bar-icon" />}
        {kind === 'stage' && head.state === 'running' && <Play className="bar-icon" />}
        {kind === 'stage' && members.some((bar) => bar.pinned) && <Pin className="bar-icon" />}
        {kind === 'stage' && members.some((bar) => bar.late) && <em className="bar-late-word">late</em>}
        <span className="bar-words">{wordsOf(item, where)}</span>
      </span>
    </div>
  );
}
