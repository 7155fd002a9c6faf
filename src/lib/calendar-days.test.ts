import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { addDays, daysFromTo, mondayOf } from './calendar-days.ts';

describe('days of the calendar', () => {
  it('go over the ends of months and years and through leap days', () => {
    expect(addDays('2026-12-31', 1)).toBe('2027-01-01');
    expect(addDays('2028-02-28', 1)).toBe('2028-02-29');
    expect(addDays('2026-03-01', -1)).toBe('2026-02-28');
  });

  // ISO 8601: weeks begin on Monday; week 1 of 2026 begins on 29 December 2025.
  it('know their Monday', () => {
    expect(mondayOf('2026-01-01')).toBe('2025-12-29');
    expect(mondayOf('2026-12-06')).toBe('2026-11-30');
    expect(mondayOf('2026-11-30')).toBe('2026-11-30');
  });

  it('count both ends, over clock changes too', () => {
    expect(daysFromTo('2026-03-28', '2026-03-30')).toBe(3);
    fc.assert(
      fc.property(fc.integer({ min: -800, max: 800 }), (n) => {
        expect(daysFromTo('2026-06-15', addDays('2026-06-15', n))).toBe(n + 1);
      }),
    );
  });

  it('refuse what is no day', () => {
    expect(() => addDays('soon', 1)).toThrow(RangeError);
  });
});
