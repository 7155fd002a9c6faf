import fc from 'fast-check';
import { expect, test } from 'vitest';
import { fractionAt, instantAt, hoursWorthShowing, type Axis } from './axis.ts';
import { instantOf } from '#src/lib/wall-clock.ts';

const zone = 'Europe/Berlin';
const one: Axis = { zone, days: ['2027-03-11'], fromMinute: 7 * 60, toMinute: 17 * 60 };
const at = (day: string, minute: number) => instantOf(day, minute, zone);

test('the middle of the shown hours is the middle of the axis', () => {
  expect(fractionAt(one, at('2027-03-11', 12 * 60))).toBe(0.5);
  expect(fractionAt(one, at('2027-03-11', 6 * 60))).toBe(0);
  expect(fractionAt(one, at('2027-03-12', 9 * 60))).toBe(1);
});

test('nights are cut out: an evening and the next morning meet on the seam', () => {
  const three = { ...one, days: ['2027-03-11', '2027-03-12', '2027-03-13'] };
  expect(fractionAt(three, at('2027-03-11', 17 * 60))).toBeCloseTo(1 / 3, 12);
  expect(fractionAt(three, at('2027-03-11', 23 * 60))).toBeCloseTo(1 / 3, 12);
  expect(fractionAt(three, at('2027-03-12', 7 * 60))).toBeCloseTo(1 / 3, 12);
  expect(fractionAt(three, at('2027-03-12', 12 * 60))).toBe(0.5);
});

test('three hours are three hours wide on the days on which the clocks change, too', () => {
  for (const day of ['2027-03-28', '2027-10-31', '2027-06-01']) {
    const axis = { ...one, days: [day] };
    expect(fractionAt(axis, at(day, 12 * 60)) - fractionAt(axis, at(day, 9 * 60))).toBeCloseTo(0.3, 12);
  }
});

test('time never runs backwards on the axis', () => {
  const week = { ...one, days: ['2027-03-08', '2027-03-09', '2027-03-10', '2027-03-11'] };
  const base = at('2027-03-07', 0);
  fc.assert(
    fc.property(fc.nat(8000), fc.nat(600), (minute, more) => {
      const earlier = fractionAt(week, base + minute * 60_000);
      expect(fractionAt(week, base + (minute + more) * 60_000)).toBeGreaterThanOrEqual(earlier);
    }),
    { seed: 11, numRuns: 300 },
  );
});

test('hours shown reach from the first thing to the last, and what dries overnight does not stretch them', () => {
  const span = (day: string, from: number, to: number) => ({ from: at(day, from), to: at(day, to) });
  expect(hoursWorthShowing(zone, [span('2027-03-11', 450, 990)])).toEqual({ fromMinute: 420, toMinute: 1020 });
  const overnight = { from: at('2027-03-11', 15 * 60), to: at('2027-03-12', 6 * 60) };
  expect(hoursWorthShowing(zone, [span('2027-03-11', 450, 990), overnight])).toEqual({
    fromMinute: 420,
    toMinute: 1020,
  });
  expect(hoursWorthShowing(zone, [])).toEqual({ fromMinute: 420, toMinute: 1080 });
  expect(hoursWorthShowing(zone, [], 3)).toEqual({ fromMinute: 420, toMinute: 1140 });
  expect(hoursWorthShowing(zone, [span('2027-03-11', 900, 1439)], 12)).toEqual({ fromMinute: 720, toMinute: 1440 });
});

test('an instant is found again at its place of the axis, on full five minutes', () => {
  const week = { zone, days: ['2027-03-10', '2027-03-11', '2027-03-12'], fromMinute: 420, toMinute: 1080 };
  for (const at of ['2027-03-10T07:05', '2027-03-11T12:00', '2027-03-12T17:55']) {
    const instant = instantOf(at.slice(0, 10), Number(at.slice(11, 13)) * 60 + Number(at.slice(14)), zone);
    expect(instantAt(week, fractionAt(week, instant), 5)).toBe(instant);
    expect(instantAt(week, fractionAt(week, instant + 2 * 60_000), 5)).toBe(instant);
  }
  expect(instantAt(week, -1, 5)).toBe(instantOf('2027-03-10', 420, zone));
  expect(instantAt(week, 2, 5)).toBe(instantOf('2027-03-12', 1080, zone));
});
