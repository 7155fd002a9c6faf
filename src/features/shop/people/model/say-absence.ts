import type { Absence } from '#contracts/people.ts';
import { addDays } from '#src/lib/calendar-days.ts';
import { formatDay, type Formats } from '#src/lib/formats.ts';
import { minuteOfDay } from '#src/lib/wall-clock.ts';

/** `Mon 23 Mar to Fri 27 Mar`, `Tue 24 Mar 13:00 to 15:00`, `from Mon 30 Mar until further notice`. */
export function sayAbsence({ from, to }: Pick<Absence, 'from' | 'to'>, formats: Formats): string {
  const { zone, dayOf, today, dateSpan } = formats;
  const day = (text: string) => formatDay(text, 'short', today());
  const isMidnight = (at: string) => minuteOfDay(Date.parse(at), zone) === 0;
  if (to === null) return `from ${day(dayOf(from))} until further notice`;
  if (!isMidnight(from) || !isMidnight(to)) return dateSpan(from, to);
  const [first, last] = [dayOf(from), addDays(dayOf(to), -1)];
  return first === last ? day(first) : `${day(first)} to ${day(last)}`;
}
