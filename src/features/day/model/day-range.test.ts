import { expect, test } from 'vitest';
import { daysShown, rangeOf, step } from './day-range.ts';
import { wallMs } from './wall-time.ts';

const zone = 'Europe/Berlin';
const hours = (range: { from: string; to: string }) => (Date.parse(range.to) - Date.parse(range.from)) / 3_600_000;

test('a week runs from Monday to Sunday (ISO 8601), also across a year end', () => {
  // 1 January 2027 is a Friday (ISO 8601: week 53 of 2026, whose Monday is 28 December).
  expect(daysShown('2027-01-01', 'week')).toEqual([
    '2026-12-28',
    '2026-12-29',
    '2026-12-30',
    '2026-12-31',
    '2027-01-01',
    '2027-01-02',
    '2027-01-03',
  ]);
  expect(daysShown('2027-01-03', 'week')[0]).toBe('2026-12-28');
  expect(daysShown('2027-01-04', 'week')[0]).toBe('2027-01-04');
});

test('stepping on and back ends where it began', () => {
  for (const kind of ['day', 'three', 'week'] as const)
    expect(step(step('2028-02-28', kind, 1), kind, -1)).toBe('2028-02-28');
});

test('the days on which the clocks change have 23 and 25 hours', () => {
  // European summer time 2027: begins on 28 March, ends on 31 October at 01:00 UTC (directive 2000/84/EC: last Sundays).
  expect(hours(rangeOf(['2027-03-28'], zone))).toBe(23);
  expect(hours(rangeOf(['2027-10-31'], zone))).toBe(25);
  expect(hours(rangeOf(daysShown('2027-03-28', 'week'), zone))).toBe(7 * 24 - 1);
  expect(rangeOf(['2027-03-28'], zone).from).toBe('2027-03-27T23:00:00.000Z');
});

test('the wall clock is the shop’s, not the browser’s, on either side of a change of the clocks', () => {
  const shown = (at: string) => new Date(wallMs(zone, Date.parse(at))).toISOString().slice(0, 16);
  expect(shown('2027-07-01T23:30:00Z')).toBe('2027-07-02T01:30');
  expect(shown('2027-03-28T00:59:00Z')).toBe('2027-03-28T01:59');
  expect(shown('2027-03-28T01:00:00Z')).toBe('2027-03-28T03:00');
  expect(shown('2027-10-31T00:59:00Z')).toBe('2027-10-31T02:59');
  expect(shown('2027-10-31T01:00:00Z')).toBe('2027-10-31T02:00');
});
