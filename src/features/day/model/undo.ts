import type { Move } from './move-in-view.ts';
import type { Bar } from '#contracts/day.ts';

/** A move that was made, and the one that takes it back. */
export type Deed = { words: string; again: Move; back: Move };
export type UndoStack = { done: readonly Deed[]; undone: readonly Deed[] };

export const emptyStack: UndoStack = { done: [], undone: [] };
const most = 50;

export const didMove = (stack: UndoStack, deed: Deed): UndoStack => ({
  done: [...stack.done, deed].slice(-most),
  undone: [],
});

/** The stack after the last deed was taken back; the same stack where there is none. */
export function tookBack(stack: UndoStack): UndoStack {
  const deed = stack.done.at(-1);
  return deed ? { done: stack.done.slice(0, -1), undone: [...stack.undone, deed] } : stack;
}

export function didAgain(stack: UndoStack): UndoStack {
  const deed = stack.undone.at(-1);
  return deed ? { done: [...stack.done, deed], undone: stack.undone.slice(0, -1) } : stack;
}

/** The move that puts a bar back to where and with whom it is now. */
export const moveBack = (bar: Bar): Move => ({
  stageId: bar.id,
  start: bar.from,
  placeId: bar.placeId,
  personId: bar.personId,
  pinned: bar.pinned,
});
