import { useEffect, type KeyboardEvent, type RefObject } from 'react';
import { fractionAt, type Axis } from '../model/axis.ts';
import type { Drawn } from '../model/board.ts';
import { useBoardContext } from './board-context.ts';
import type { Layout } from './layout.ts';
import { neighbourOf, type Direction } from './neighbour.ts';
import { headerOf, NAMES } from './sizes.ts';

const directions: Partial<Record<string, Direction>> = {
  ArrowLeft: 'left',
  ArrowRight: 'right',
  ArrowUp: 'up',
  ArrowDown: 'down',
  Home: 'first',
  End: 'last',
};

type Scene = { board: readonly Drawn[]; layout: Layout; axis: Axis; laneWidth: number };

/** Arrows go from bar to bar, Enter opens, Alt with an arrow moves the bar by five minutes. Tab reaches one bar. */
export function useArrows(
  box: RefObject<HTMLElement | null>,
  scene: Scene,
  onNudge: (item: Drawn, minutes: number) => void,
): (event: KeyboardEvent) => void {
  const { store, open } = useBoardContext();
  // Bars of folded rows are not there to be walked to.
  const { layout } = scene;
  const board = layout.lines.flatMap((line) => (line.kind === 'row' ? line.bars.map(({ item }) => item) : []));
  useEffect(() => {
    const { focusStop } = store.get();
    if (!board.some((item) => item.id === focusStop)) store.set({ focusStop: board[0]?.id ?? null });
  });
  return (event) => {
    const id = (event.target as HTMLElement).dataset['bar'];
    const item = board.find((one) => one.id === id);
    if (!item) return;
    const direction = directions[event.key];
    if (event.key === 'Enter' || event.key === ' ') open(item);
    else if (event.altKey && (direction === 'left' || direction === 'right'))
      onNudge(item, direction === 'left' ? -5 : 5);
    else if (direction) focusBar(box.current, scene, neighbourOf(board, item.id, direction));
    else return;
    event.preventDefault();
  };
}

/** Focuses a bar; one too far away to be drawn is scrolled to first. */
function focusBar(box: HTMLElement | null, scene: Scene, item: Drawn | null): void {
  if (!box || !item) return;
  const find = () => box.querySelector<HTMLElement>(`[data-bar="${item.id}"]`);
  const there = find();
  if (there) return there.focus();
  const line = scene.layout.lines.find(({ key }) => key === item.rowId);
  const [height, width] = [box.clientHeight - headerOf(scene.axis), box.clientWidth - NAMES];
  box.scrollTo({
    top: (line?.top ?? 0) - height / 2,
    left: fractionAt(scene.axis, item.from) * scene.laneWidth - width / 2,
  });
  // Drawn after the scroll has been heard of.
  requestAnimationFrame(() => requestAnimationFrame(() => find()?.focus()));
}
