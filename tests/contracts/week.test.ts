import { describe, expect, test } from 'vitest';
import { emptyWeek, readDayHours, sayDayHours, shiftsOf, weekOf } from '#contracts/week.ts';

const minutes = (text: string): number => Number(text.split(':')[0]) * 60 + Number(text.split(':')[1] ?? 0);
const hours = (from: string, to: string, ...breaks: [string, string][]) => ({
  from: minutes(from),
  to: minutes(to),
  breaks: breaks.map(([a, b]) => ({ from: minutes(a), to: minutes(b) })),
});

describe('hours of a day', () => {
  test.each([
    ['7-15:30', hours('7', '15:30')],
    ['07:00–15.30', hours('7', '15:30')],
    ['7 to 1530', hours('7', '15:30')],
    ['7am - 3:30 pm', hours('7', '15:30')],
    ['12am-12pm', hours('0', '12')],
    ['22-6 (1-1:30)', hours('22', '30', ['25', '25:30'])],
    ['7-15 (12-12:30, 9:30-9:45)', hours('7', '15', ['9:30', '9:45'], ['12', '12:30'])],
    ['8-24', hours('8', '24')],
    ['', null],
    [' off ', null],
  ])('%j', (text, wanted) => expect(readDayHours(text)).toEqual({ hours: wanted }));

  test.each([
    '7',
    '7-15-16',
    'early',
    '25-26',
    '7-15 (6-6:30)',
    '7-15 (9-10, 9:30-11)',
    '7-15 (9)',
    '7-15 (9-10',
    '13pm-14',
  ])('%j is refused', (text) => expect(readDayHours(text)).toHaveProperty('fault'));

  test('are written as they are read', () => {
    for (const text of ['07:00-15:30', '22:00-06:00 (01:00-01:30)', '07:00-15:30 (09:30-09:45, 11:45-12:15)', '']) {
      const read = readDayHours(text);
      expect('hours' in read && sayDayHours(read.hours)).toBe(text);
    }
  });
});

describe('a week', () => {
  const week = { ...emptyWeek(), MO: hours('7', '15'), TU: hours('7', '15'), FR: hours('22', '30', ['25', '25:30']) };
  test('is one shift for each kind of day, and that again the same week', () => {
    const shifts = shiftsOf(week, '2026-03-09');
    expect(shifts).toEqual([
      { startsLocal: '2026-03-09T07:00', rule: 'FREQ=WEEKLY;BYDAY=MO,TU', minutes: 480, breaks: [] },
      {
        startsLocal: '2026-03-09T22:00',
        rule: 'FREQ=WEEKLY;BYDAY=FR',
        minutes: 480,
        breaks: [{ after: 180, minutes: 30 }],
      },
    ]);
    expect(weekOf(shifts)).toEqual(week);
  });

  const one = { startsLocal: '2026-03-09T07:00', minutes: 480, breaks: [] };
  test.each([
    [[{ ...one, rule: null }]],
    [[{ ...one, rule: 'FREQ=WEEKLY;INTERVAL=2;BYDAY=MO' }]],
    [[{ ...one, rule: 'FREQ=WEEKLY;BYDAY=MO;UNTIL=20270101' }]],
    [[{ ...one, rule: 'FREQ=DAILY' }]],
    [
      [
        { ...one, rule: 'FREQ=WEEKLY;BYDAY=MO' },
        { ...one, rule: 'FREQ=WEEKLY;BYDAY=MO,TU' },
      ],
    ],
  ])('is not what %j says', (shifts) => expect(weekOf(shifts)).toBeNull());
});
