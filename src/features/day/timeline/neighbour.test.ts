import { expect, test } from 'vitest';
import { boardOf } from '../model/board.ts';
import { barAt, day, uuid, viewOf, zone } from '../testing/sample-day.ts';
import { neighbourOf } from './neighbour.ts';
import { clockOf, scaleOf } from './scale.ts';

const axis = { zone, days: [day], fromMinute: 420, toMinute: 1020 };
const inPlace = (n: number, start: number, place: number) =>
  barAt(n, start, [['flash', 60]], { placeId: uuid(1, place), personId: null, personName: null });
// Booth 1: 8:00 and 12:00; booth 2 is empty; prep 1: 9:00 and 11:40.
const board = boardOf(viewOf([inPlace(1, 480, 1), inPlace(2, 720, 1), inPlace(3, 540, 11), inPlace(4, 700, 11)]), axis);
const from = (n: number, direction: Parameters<typeof neighbourOf>[2]) =>
  neighbourOf(board, uuid(2, n), direction)?.members[0].jobNumber ?? null;

test('arrows go along the row, and to what is nearest in time in the next row that has bars', () => {
  expect([from(1, 'right'), from(2, 'left'), from(2, 'first'), from(1, 'last')]).toEqual([2402, 2401, 2401, 2402]);
  expect([from(1, 'down'), from(2, 'down'), from(3, 'up'), from(4, 'up')]).toEqual([2403, 2404, 2401, 2402]);
});

test('at the edges they lead nowhere', () => {
  expect([from(1, 'left'), from(2, 'right'), from(1, 'up'), from(4, 'down')]).toEqual([null, null, null, null]);
});

test('slots divide the shown hours, leave their label room and fill the width at most', () => {
  const week = {
    ...axis,
    days: Array.from({ length: 7 }, (_, i) => `2027-03-${i + 10}`),
    fromMinute: 360,
    toMinute: 1080,
  };
  for (const [shown, width] of [
    [axis, 1200],
    [axis, 700],
    [week, 1200],
    [week, 2400],
  ] as const) {
    const { slotMinutes, slotWidth } = scaleOf(shown, width, 1);
    const slots = (shown.days.length * (shown.toMinute - shown.fromMinute)) / slotMinutes;
    expect(Number.isInteger(slots)).toBe(true);
    expect(1440 % slotMinutes).toBe(0);
    expect(slotWidth).toBeGreaterThanOrEqual(31);
    expect(slotWidth * slots).toBeLessThanOrEqual(width);
  }
  expect(clockOf(1440)).toBe('24:00:00');
});
