import { parseLooseTime } from '#src/lib/loose-time.ts';
import { formatMinute, type Reader } from '#src/lib/formats.ts';
import { instantOf, localDayOf, minuteOfDay } from '#src/lib/wall-clock.ts';

/** A day of the calendar and a time of day, as typed. */
export type DateTimeTyped = { day: string; time: string };
export type Read<T> = { value: T } | { fault: string };

/** The instant that is meant, null where nothing is typed. A day without a time means `usual` minutes after midnight. */
export function readDateTime(typed: DateTimeTyped, zone: string, usual: number): Read<string | null> {
  if (typed.day === '') return typed.time.trim() === '' ? { value: null } : { fault: 'Choose the day as well.' };
  const minutes = typed.time.trim() === '' ? usual : parseLooseTime(typed.time);
  if (minutes === null) return { fault: 'This is no time of day: write it as 9, 9:30 or 14.15.' };
  const day = /^\d{4}-\d\d-\d\d$/.test(typed.day) ? Date.parse(`${typed.day}T00:00:00Z`) : NaN;
  if (Number.isNaN(day)) return { fault: 'This day is not in the calendar.' };
  return { value: new Date(instantOf(typed.day, minutes, zone)).toISOString() };
}

/** An instant as it would be typed. */
export function typeDateTime(at: string | null, { zone, clock }: Pick<Reader, 'zone' | 'clock'>): DateTimeTyped {
  if (at === null) return { day: '', time: '' };
  const ms = Date.parse(at);
  return { day: localDayOf(ms, zone), time: formatMinute(minuteOfDay(ms, zone), clock) };
}

/** Degrees typed in the reader's unit as Celsius, exactly; null where nothing is typed. */
export function readCelsius(
  typed: string,
  unit: Reader['unit'],
  range: { min: number; max: number },
): Read<number | null> {
  if (typed.trim() === '') return { value: null };
  const number = readNumber(typed);
  const celsius = number === null ? NaN : unit === 'C' ? number : ((number - 32) * 5) / 9;
  const inUnit = (c: number) => `${Math.round(unit === 'C' ? c : (c * 9) / 5 + 32)} °${unit}`;
  if (Number.isNaN(celsius) || celsius < range.min || celsius > range.max)
    return { fault: `Write a temperature from ${inUnit(range.min)} to ${inUnit(range.max)}.` };
  return { value: celsius };
}

/** Celsius as it would be typed, never more than it is: 48.888… is 120 for who counts in Fahrenheit, else 48.888. */
export function typeCelsius(celsius: number | null, unit: Reader['unit']): string {
  if (celsius === null) return '';
  const number = unit === 'C' ? celsius : (celsius * 9) / 5 + 32;
  // A hair is forgiven: (120 - 32) * 5 / 9 and back may fall short of 120.
  return String(Math.floor(number * 1000 + 1e-6) / 1000);
}

/** Whole minutes; null where nothing is typed. */
export function readMinutes(typed: string, range: { min: number; max: number }): Read<number | null> {
  if (typed.trim() === '') return { value: null };
  const number = readNumber(typed);
  if (number === null || !Number.isInteger(number) || number < range.min || number > range.max)
    return { fault: `Write whole minutes from ${range.min} to ${range.max}.` };
  return { value: number };
}

/** Takes a comma as well as a point. */
function readNumber(typed: string): number | null {
  const plain = typed.trim().replace(',', '.');
  return /^-?\d+(\.\d+)?$/.test(plain) ? Number(plain) : null;
}
