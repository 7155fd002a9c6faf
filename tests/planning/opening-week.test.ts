import { expect, it } from 'vitest';
import { changeWeek, openingWeek } from '#server/planning/opening-week.ts';

const at = (id: string, startsLocal: string, rule: string | null, minutes = 600) => ({
  id,
  startsLocal,
  rule,
  minutes,
});
const plain = at('a', '2026-01-05T07:00', 'FREQ=WEEKLY;BYDAY=MO,TU');

it('ends what holds the day before, takes away what would begin later, and adds one rule for the same hours', () => {
  const later = at('b', '2026-04-06T08:00', 'FREQ=WEEKLY;BYDAY=MO');
  const change = changeWeek([plain, later], '2026-03-16', [
    { day: 'WE', from: 480, to: 720 },
    { day: 'MO', from: 480, to: 720 },
    { day: 'MO', from: 1320, to: 1800 },
  ]);
  expect(change).toEqual({
    end: [{ id: 'a', rule: 'FREQ=WEEKLY;BYDAY=MO,TU;UNTIL=20260315T235959' }],
    remove: ['b'],
    add: [
      { startsLocal: '2026-03-16T08:00', rule: 'FREQ=WEEKLY;BYDAY=MO,WE', minutes: 240 },
      { startsLocal: '2026-03-16T22:00', rule: 'FREQ=WEEKLY;BYDAY=MO', minutes: 480 },
    ],
  });
});

it('leaves what ended before as it is, and replaces what began the same day', () => {
  const ended = at('a', '2026-01-05T07:00', 'FREQ=WEEKLY;BYDAY=MO;UNTIL=20260301T235959');
  const today = at('b', '2026-03-16T07:00', 'FREQ=WEEKLY;BYDAY=MO');
  expect(changeWeek([ended, today], '2026-03-16', [])).toEqual({ end: [], remove: ['b'], add: [] });
});

it('tells the usual week from hours beside it', () => {
  const everySecond = at('c', '2026-03-07T08:00', 'FREQ=WEEKLY;INTERVAL=2;BYDAY=SA', 300);
  const over = at('d', '2026-03-01T08:00', null);
  const once = at('e', '2026-03-14T08:00', null);
  const week = openingWeek([plain, everySecond, over, once], '2026-03-10');
  expect(week.week).toEqual([
    { day: 'MO', from: 420, to: 1020 },
    { day: 'TU', from: 420, to: 1020 },
  ]);
  expect(week.extra.map(({ id }) => id)).toEqual(['c', 'e']);
  expect(week.next).toBeNull();
});
