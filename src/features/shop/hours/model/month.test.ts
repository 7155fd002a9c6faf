import { expect, it } from 'vitest';
import type { Closure } from '#contracts/hours.ts';
import { addMonths, isMonth, monthOf, sayMonth, type Hours } from './month.ts';

const zone = 'Europe/Berlin';
const whole = { id: 'a', version: 1, kind: 'closure', label: '', placeId: null, lampId: null, rule: null } as const;
const hours = (more: Partial<Hours>): Hours => ({
  version: 1,
  timeZone: zone,
  week: [],
  next: null,
  extra: [],
  closures: [],
  places: [],
  lamps: [],
  ...more,
});
const local = (at: Date) =>
  new Intl.DateTimeFormat('sv-SE', { timeZone: zone, dateStyle: 'short', timeStyle: 'short' }).format(at).slice(8);
/** Hours of a day as `DD hh:mm-DD hh:mm`. */
const openOn = (given: Hours, day: string, today = '2026-01-01') => {
  const found = monthOf(given, day.slice(0, 7), { zone, today }).days.find((one) => one.day === day);
  return found?.hours?.map(({ from, to }) => `${local(from)}-${local(to)}`);
};
const closed = (startsLocal: string, minutes: number): Closure => ({ ...whole, startsLocal, minutes });

it('counts months over the years', () => {
  expect([addMonths('2026-12', 1), addMonths('2026-01', -1), addMonths('2026-05', 14)]).toEqual([
    '2027-01',
    '2025-12',
    '2027-07',
  ]);
  expect(['2026-12', '2026-13', '2026-1', '', null].map(isMonth)).toEqual([true, false, false, false, false]);
  expect(sayMonth('2026-12')).toBe('December 2026');
  expect(monthOf(hours({}), '2028-02', { zone, today: '2026-01-01' }).days).toHaveLength(29);
});

it('takes the week that is set for later from its day on', () => {
  const given = hours({
    week: [{ day: 'MO', from: 420, to: 1080 }],
    next: { from: '2026-03-16', week: [{ day: 'MO', from: 360, to: 900 }] },
  });
  expect(openOn(given, '2026-03-09')).toEqual(['09 07:00-09 18:00']);
  expect(openOn(given, '2026-03-16')).toEqual(['16 06:00-16 15:00']);
});

it('joins hours beside the week to those that they meet', () => {
  const extra = [{ id: 'x', startsLocal: '2026-03-09T17:00', rule: null, minutes: 180 }];
  const given = hours({ week: [{ day: 'MO', from: 420, to: 1080 }], extra });
  expect(openOn(given, '2026-03-09')).toEqual(['09 07:00-09 20:00']);
});

it('keeps a night to the day on which it begins, and cuts it where the whole shop is closed', () => {
  const week = [{ day: 'SA' as const, from: 1320, to: 1800 }];
  // The clocks of Berlin go from 2:00 to 3:00 on Sunday 29 March 2026.
  expect(openOn(hours({ week }), '2026-03-28')).toEqual(['28 22:00-29 06:00']);
  expect(openOn(hours({ week }), '2026-03-29')).toEqual(['28 22:00-29 06:00']);
  expect(openOn(hours({ week }), '2026-03-30')).toEqual([]);
  const holiday = hours({ week, closures: [closed('2026-03-28T00:00', 1440)] });
  expect(openOn(holiday, '2026-03-28')).toEqual([]);
  expect(openOn(holiday, '2026-03-29')).toEqual(['29 00:00-29 06:00']);
  const ofOnePlace = hours({ week, closures: [{ ...closed('2026-03-28T00:00', 1440), placeId: 'p' }] });
  expect(openOn(ofOnePlace, '2026-03-28')).toEqual(['28 22:00-29 06:00']);
});

it('knows no hours of past days, but that a holiday shut them', () => {
  const given = hours({ week: [{ day: 'MO', from: 420, to: 1080 }], closures: [closed('2026-03-02T00:00', 1440)] });
  const { days } = monthOf(given, '2026-03', { zone, today: '2026-03-10' });
  expect(days.filter(({ isShut }) => isShut).map(({ day }) => day.slice(8))).toEqual(
    // The second by its holiday; from today on all but the Mondays.
    ['02', '10', '11', '12', '13', '14', '15', ...[17, 18, 19, 20, 21, 22, 24, 25, 26, 27, 28, 29, 31].map(String)],
  );
  expect(days[8]).toMatchObject({ day: '2026-03-09', hours: null, isShut: false });
});

it('puts what is closed on each of its days', () => {
  const given = hours({ closures: [closed('2026-03-27T12:00', 3 * 1440), closed('2026-02-28T00:00', 2 * 1440)] });
  const { entries, days } = monthOf(given, '2026-03', { zone, today: '2026-01-01' });
  expect(entries.map(({ firstDay, lastDay, allDay }) => [firstDay, lastDay, allDay])).toEqual([
    ['2026-02-28', '2026-03-01', true],
    ['2026-03-27', '2026-03-30', false],
  ]);
  expect(days.filter((day) => day.entries.length > 0).map(({ day }) => day.slice(8))).toEqual([
    '01',
    '27',
    '28',
    '29',
    '30',
  ]);
});
