import { describe, expect, it } from 'vitest';
import { formatDay, formatDegrees, formatDuration, formatsFor, formatTemperature } from './formats.ts';

const now = () => Date.parse('2026-03-12T08:31:00Z');
const berlin = formatsFor({ zone: 'Europe/Berlin', clock: '24', unit: 'C' }, now);
const boston = formatsFor({ zone: 'America/New_York', clock: '12', unit: 'F' }, now);

describe('formats', () => {
  it('write a time on the shop’s clock as the reader reads clocks', () => {
    expect(berlin.time('2026-03-12T08:05:00Z')).toBe('9:05');
    expect(boston.time('2026-03-12T04:05:00Z')).toBe('12:05 am');
    expect(boston.time('2026-03-12T16:05:00Z')).toBe('12:05 pm');
  });
  it('name near days and give others with what is needed of the date', () => {
    expect(berlin.dateTime('2026-03-12T08:05:00Z')).toBe('today 9:05');
    expect(berlin.dateTime('2026-03-12T23:30:00Z')).toBe('tomorrow 0:30');
    expect(berlin.dateTime('2026-03-11T08:05:00Z')).toBe('yesterday 9:05');
    expect(berlin.dateTime('2026-03-17T08:05:00Z')).toBe('Tue 17 Mar 9:05');
    expect(berlin.date('2027-01-04T08:05:00Z')).toBe('Mon 4 Jan 2027');
    expect(formatDay('2026-03-12', 'long')).toBe('Thursday 12 March');
  });
  it('say the day of a span’s end only where it is another one', () => {
    expect(berlin.span('2026-03-12T08:00:00Z', '2026-03-12T09:30:00Z')).toBe('9:00 to 10:30');
    expect(berlin.span('2026-03-12T20:00:00Z', '2026-03-13T09:30:00Z')).toBe('21:00 to tomorrow 10:30');
  });
  it('write lengths', () => {
    expect([0, 45, 60, 90, 1440, 3060, -30].map(formatDuration)).toEqual([
      '0 min',
      '45 min',
      '1 h',
      '1 h 30 min',
      '1 day',
      '2 days 3 h',
      '−30 min',
    ]);
  });
  // A common limit for vehicles with batteries is 120 F, 48.889 C: it may not read as 49 C.
  it('round a limit down and a value to the nearest', () => {
    const limit = ((120 - 32) * 5) / 9;
    expect(formatTemperature(limit, 'C', 'limit')).toBe('48 °C');
    expect(formatTemperature(limit, 'F', 'limit')).toBe('120 °F');
    expect(formatTemperature(60, 'F', 'limit')).toBe('140 °F');
    expect(formatTemperature(limit, 'C')).toBe('49 °C');
  });
  // 3 C of dew-point margin are 5.4 F; 5 F would only be 2.78 C.
  it('scale a difference without its zero point', () => {
    expect(formatDegrees(3, 'F')).toBe('5.4 °F');
    expect(formatDegrees(3, 'C')).toBe('3 °C');
  });
});
