import { expect, test } from 'vitest';
import { at, barAt, uuid, viewOf } from '../testing/sample-day.ts';
import { moveInView, type Move } from './move-in-view.ts';
import { didAgain, didMove, emptyStack, moveBack, tookBack, type Deed } from './undo.ts';

const deed = (n: number): Deed => {
  const move: Move = { stageId: uuid(2, n), start: at(480 + n), placeId: uuid(1, 1) };
  return { words: String(n), again: move, back: move };
};

test('what is taken back can be done again, until something new is done', () => {
  const two = didMove(didMove(emptyStack, deed(1)), deed(2));
  expect(didAgain(tookBack(two))).toEqual(two);
  expect(didMove(tookBack(two), deed(3))).toEqual({ done: [deed(1), deed(3)], undone: [] });
  expect(tookBack(emptyStack)).toBe(emptyStack);
});

test('the last fifty are kept', () => {
  let stack = emptyStack;
  for (let n = 0; n < 60; n++) stack = didMove(stack, deed(n));
  expect(stack.done).toHaveLength(50);
  expect(stack.done[0]?.words).toBe('10');
});

test('a move and its way back leave the board as it was', () => {
  const bar = barAt(1, 540, [['spray', 20]], { pinned: true });
  const view = viewOf([bar]);
  const there = moveInView(view, {
    stageId: bar.id,
    start: at(600),
    placeId: uuid(1, 2),
    personId: null,
    pinned: false,
  });
  expect(moveInView(there, moveBack(bar)).bars).toEqual(view.bars);
});
