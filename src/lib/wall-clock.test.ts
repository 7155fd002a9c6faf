import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { addDays } from './calendar-days.ts';
import { instantOf, localDayOf, minuteOfDay } from './wall-clock.ts';

const at = (day: string, hhmm: string, zone: string) => {
  const [hours = 0, minutes = 0] = hhmm.split(':').map(Number);
  return new Date(instantOf(day, hours * 60 + minutes, zone)).toISOString();
};

describe('the instant at which the clock on the wall shows a time', () => {
  // Offsets of the IANA time zone database: New York -5 h, in summer -4 h from 2024-03-10 to 2024-11-03.
  it('is the first of two where the clock goes back', () => {
    expect(at('2024-11-03', '01:30', 'America/New_York')).toBe('2024-11-03T05:30:00.000Z');
  });
  // RFC 5545, 3.3.5: a time that is skipped is read with the offset before the gap.
  it('is read with the offset before the gap where the clock leaps', () => {
    expect(at('2024-03-10', '02:30', 'America/New_York')).toBe('2024-03-10T07:30:00.000Z');
  });
  // Lord Howe moves by half an hour: 2024-10-06 has 23.5 h.
  it.each([
    ['America/New_York', '2024-03-10', 23],
    ['America/New_York', '2024-11-03', 25],
    ['Australia/Lord_Howe', '2024-10-06', 23.5],
    ['Europe/Berlin', '2026-06-01', 24],
  ])('%s %s lasts %d h', (zone, day, hours) => {
    expect((instantOf(addDays(day, 1), 0, zone) - instantOf(day, 0, zone)) / 3_600_000).toBe(hours);
  });

  it('shows that time again, except inside a gap', () => {
    const zones = fc.constantFrom('America/New_York', 'Europe/Berlin', 'Australia/Lord_Howe', 'Asia/Kolkata', 'UTC');
    const days = fc.integer({ min: 0, max: 1500 }).map((n) => addDays('2023-01-01', n));
    fc.assert(
      fc.property(zones, days, fc.integer({ min: 180, max: 1439 }), (zone, day, minutes) => {
        const instant = instantOf(day, minutes, zone);
        expect([localDayOf(instant, zone), minuteOfDay(instant, zone)]).toEqual([day, minutes]);
      }),
      { seed: 5, numRuns: 300 },
    );
  });
});
