import { useEffect, type KeyboardEvent, type RefObject } from 'react';
import type { Drawn } from '../model/board.ts';
import { useBoardContext } from './board-context.ts';
import { neighbourOf, type Direction } from './neighbour.ts';

const directions: Partial<Record<string, Direction>> = {
  ArrowLeft: 'left',
  ArrowRight: 'right',
  ArrowUp: 'up',
  ArrowDown: 'down',
  Home: 'first',
  End: 'last',
};

/** Arrows go from bar to bar, Enter opens, Alt with an arrow moves the bar by five minutes. Tab reaches one bar. */
export function useArrows(
  frame: RefObject<HTMLElement | null>,
  board: readonly Drawn[],
  onNudge: (item: Drawn, minutes: number) => void,
): (event: KeyboardEvent) => void {
  const { store, open } = useBoardContext();
  useEffect(() => {
    const { focusStop } = store.get();
    if (!board.some((item) => item.id === focusStop)) store.set({ focusStop: board[0]?.id ?? null });
  }, [board, store]);
  return (event) => {
    const id = (event.target as HTMLElement).dataset['bar'];
    const item = board.find((one) => one.id === id);
    if (!item) return;
    const direction = directions[event.key];
    if (event.key === 'Enter' || event.key === ' ') open(item);
    else if (event.altKey && (direction === 'left' || direction === 'right'))
      onNudge(item, direction === 'left' ? -5 : 5);
    else if (direction) focusBar(frame.current, neighbourOf(board, item.id, direction));
    else return;
    event.preventDefault();
  };
}

function focusBar(frame: HTMLElement | null, item: Drawn | null): void {
  if (item) frame?.querySelector<HTMLElement>(`[data-bar="${item.id}"]`)?.focus();
}
