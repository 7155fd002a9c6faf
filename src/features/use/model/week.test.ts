import { describe, expect, it } from 'vitest';
import { instantsOf, readRange, stepRange, weekOf, writeRange } from './week.ts';

const today = '2026-03-12';
const read = (address: string) => readRange(new URLSearchParams(address), today);

describe('the range of booth use', () => {
  it('is this week from Monday, unless the address says otherwise', () => {
    expect(read('')).toEqual({ first: '2026-03-09', last: '2026-03-15' });
    expect(read('from=2026-03-05')).toEqual({ first: '2026-03-02', last: '2026-03-08' });
    expect(read('from=2026-03-05&to=2026-03-06')).toEqual({ first: '2026-03-05', last: '2026-03-06' });
  });

  it('takes what makes no sense as this week', () => {
    for (const address of ['from=soon', 'from=2026-03-06&to=2026-03-05', 'from=2020-01-01&to=2026-03-05'])
      expect(read(address)).toEqual(weekOf(today));
  });

  it('knows Sunday as the end of the week (ISO 8601)', () => {
    expect(weekOf('2026-03-15').first).toBe('2026-03-09');
    expect(weekOf('2027-01-01').first).toBe('2026-12-28');
  });

  it('is written as short as it can be and read back', () => {
    expect(writeRange(weekOf(today), today)).toEqual({});
    for (const range of [weekOf('2026-01-20'), { first: '2026-03-05', last: '2026-03-06' }])
      expect(readRange(new URLSearchParams(writeRange(range, today)), today)).toEqual(range);
  });

  it('steps by its own length', () => {
    expect(stepRange(weekOf(today), -1)).toEqual(weekOf('2026-03-05'));
    expect(stepRange({ first: '2026-03-05', last: '2026-03-06' }, 1)).toEqual({
      first: '2026-03-07',
      last: '2026-03-08',
    });
  });

  // Clocks go forward on 29 March 2026 in Amsterdam and on 8 March 2026 in New York: a week of 167 hours.
  it('has one hour less in the week in which the clocks go forward', () => {
    const hours = (day: string, zone: string) => {
      const { from, to } = instantsOf(weekOf(day), zone);
      return (Date.parse(to) - Date.parse(from)) / 3_600_000;
    };
    expect(hours('2026-03-25', 'Europe/Amsterdam')).toBe(167);
    expect(hours('2026-03-04', 'America/New_York')).toBe(167);
    expect(hours('2026-03-12', 'Europe/Amsterdam')).toBe(168);
  });
});
