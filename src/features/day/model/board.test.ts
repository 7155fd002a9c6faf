import { expect, test } from 'vitest';
import { barAt, day, uuid, viewOf, zone } from '../testing/sample-day.ts';
import type { Axis } from './axis.ts';
import { boardOf } from './board.ts';
import { itemsOf } from './items.ts';

// Ten hours: a bar of one hour is a tenth of the axis.
const axis: Axis = { zone, days: [day], fromMinute: 420, toMinute: 1020 };
const hour = 60;

test('a load is one bar, its lamps and hands are drawn once', () => {
  const shared = { loadId: uuid(4, 99), lampIds: [uuid(1, 21)], placeId: uuid(1, 11) };
  const first = barAt(
    5,
    480,
    [
      ['work', 10],
      ['bake', 30],
      ['cool', 20],
    ],
    shared,
  );
  const second = barAt(
    3,
    480,
    [
      ['work', 10],
      ['bake', 30],
      ['cool', 20],
    ],
    shared,
  );
  const items = itemsOf(viewOf([first, second]));
  expect(items.map((item) => [item.kind, item.members.map((bar) => bar.jobNumber)])).toEqual([
    ['stage', [2403, 2405]],
    ['lamp', [2403, 2405]],
    ['hands', [2403, 2405]],
  ]);
});

test('hands that pause between coats are free in between, and touching phases are one stretch', () => {
  const bar = barAt(1, 480, [
    ['setup', 10],
    ['spray', 10],
    ['flash', 15],
    ['spray', 10],
  ]);
  const hands = itemsOf(viewOf([bar])).filter((item) => item.kind === 'hands');
  expect(hands.map((item) => (item.to - item.from) / 60_000)).toEqual([20, 10]);
});

test('phases fill the bar from left to right in proportion to their minutes', () => {
  const bar = barAt(1, 480, [
    ['setup', 15],
    ['spray', 15],
    ['flash', 30],
  ]);
  const [drawn] = boardOf(viewOf([bar]), axis);
  expect(
    drawn?.shape.segments.map((s) => [s.kind, s.left, s.width].map((v) => (typeof v === 'number' ? Math.round(v) : v))),
  ).toEqual([
    ['setup', 0, 25],
    ['spray', 25, 25],
    ['flash', 50, 50],
  ]);
});

test('a label may run on until the next bar of the row, never into it', () => {
  const board = boardOf(viewOf([barAt(1, 480, [['work', hour]]), barAt(2, 660, [['work', hour]])]), axis);
  const [first, second] = board.filter((item) => item.kind === 'stage');
  expect(first?.shape.labelRoom).toBeCloseTo(300);
  expect(second?.shape.labelRoom).toBeCloseTo(600);
});

test('window lines of neighbours share the gap, and the true window is kept', () => {
  const window = { earliest: null, latest: null };
  const board = boardOf(
    viewOf([barAt(1, 480, [['work', hour]], { window }), barAt(2, 660, [['work', hour]], { window })]),
    axis,
  ).filter((item) => item.kind === 'stage');
  const right = (i: number) => (board[i]?.shape.shortWindow.left ?? 0) + (board[i]?.shape.shortWindow.width ?? 0);
  // Between 9:00 and 11:00 they meet at 10:00: one bar's width after the first, one before the second.
  expect(right(0)).toBeCloseTo(200);
  expect(board[1]?.shape.shortWindow.left).toBeCloseTo(-100);
  expect(board[0]?.shape.shortWindow.goesOnRight).toBe(true);
  expect(board[0]?.shape.window.width).toBeCloseTo(1000);
});

test('a held place is outlined after the bar, up to the next one', () => {
  const held = barAt(1, 480, [['bake', hour]]);
  held.heldTo = new Date(Date.parse(held.to) + 3 * hour * 60_000).toISOString();
  const alone = boardOf(viewOf([held]), axis)[0];
  expect(alone?.shape.tail?.width).toBeCloseTo(300);
  const followed = boardOf(viewOf([held, barAt(2, 600, [['work', hour]])]), axis)[0];
  expect(followed?.shape.tail?.width).toBeCloseTo(100);
});

test('what happens in hidden hours only is not drawn', () => {
  expect(boardOf(viewOf([barAt(1, 1100, [['flash', 120]])]), axis)).toEqual([]);
});
