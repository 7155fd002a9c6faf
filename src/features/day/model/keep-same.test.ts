import { replaceEqualDeep } from '@tanstack/react-query';
import { expect, test } from 'vitest';
import { at, barAt, day, uuid, viewOf, zone } from '../testing/sample-day.ts';
import { boardOf } from './board.ts';
import { keepSame } from './keep-same.ts';
import { moveInView } from './move-in-view.ts';
import type { DayView } from '#contracts/day.ts';

const axis = { zone, days: [day], fromMinute: 420, toMinute: 1020 };
const again = (view: DayView) => replaceEqualDeep(view, JSON.parse(JSON.stringify(view)) as DayView);

test('an answer that says the same draws nothing anew', () => {
  const view = viewOf([barAt(1, 480, [['work', 60]]), barAt(2, 600, [['spray', 30]], { placeId: uuid(1, 2) })]);
  const before = boardOf(view, axis);
  const after = keepSame(before, boardOf(again(view), axis));
  expect(after).toHaveLength(before.length);
  for (const [i, item] of after.entries()) expect(item).toBe(before[i]);
});

test('one bar that moves changes itself and whom it makes room for, nobody else', () => {
  const bars = [
    barAt(1, 480, [['bake', 60]]),
    barAt(2, 600, [['bake', 30]]),
    barAt(3, 600, [['bake', 30]], { placeId: uuid(1, 2) }),
  ];
  const view = viewOf(bars);
  const before = boardOf(view, axis);
  const moved = moveInView(view, { stageId: uuid(2, 2), start: at(660), placeId: uuid(1, 1) });
  const after = keepSame(before, boardOf(replaceEqualDeep(view, moved), axis));
  expect(after.filter((item) => !before.includes(item)).map((item) => item.id)).toEqual([uuid(2, 1), uuid(2, 2)]);
});
