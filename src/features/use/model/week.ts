import { localDay } from '#contracts/common.ts';
import { addDays, daysFromTo, mondayOf } from '#src/lib/calendar-days.ts';
import { instantOf } from '#src/lib/wall-clock.ts';

/** Days of the shop's calendar, both included. */
export type DayRange = { first: string; last: string };
const longest = 366;

export const weekOf = (day: string): DayRange => ({ first: mondayOf(day), last: addDays(mondayOf(day), 6) });

export const lengthOf = ({ first, last }: DayRange): number => daysFromTo(first, last);

/** Reads the address; what makes no sense is this week. */
export function readRange(params: URLSearchParams, today: string): DayRange {
  const first = localDay.safeParse(params.get('from'));
  const last = localDay.safeParse(params.get('to'));
  if (!first.success || !last.success) return weekOf(first.success ? first.data : today);
  const range = { first: first.data, last: last.data };
  const days = lengthOf(range);
  return days < 1 || days > longest ? weekOf(today) : range;
}

/** The shortest address that says it. */
export function writeRange(range: DayRange, today: string): Record<string, string> {
  if (isWeek(range)) return range.first === mondayOf(today) ? {} : { from: range.first };
  return { from: range.first, to: range.last };
}

export const isWeek = (range: DayRange): boolean => range.first === mondayOf(range.first) && lengthOf(range) === 7;

/** The range of the same length before or after it. */
export function stepRange(range: DayRange, direction: 1 | -1): DayRange {
  const days = lengthOf(range) * direction;
  return { first: addDays(range.first, days), last: addDays(range.last, days) };
}

/** From the first day's midnight to the midnight after the last, on the shop's clock: days may have 23 or 25 hours. */
export const instantsOf = ({ first, last }: DayRange, zone: string) => ({
  from: new Date(instantOf(first, 0, zone)).toISOString(),
  to: new Date(instantOf(addDays(last, 1), 0, zone)).toISOString(),
});
