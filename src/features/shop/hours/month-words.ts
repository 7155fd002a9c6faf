import type { Formats } from '#src/lib/formats.ts';
import { closureWords, nameOfThing, type Things } from '../parts/closure-form.ts';
import type { MonthDay, MonthEntry } from './model/month.ts';

/** `Stocktaking`, or its kind where it has no name. */
export const nameOfEntry = ({ closure }: MonthEntry): string => closure.label || closureWords[closure.kind];

/** `Maintenance, Booth 1`; the kind only where the name does not say it. */
export const kindOfEntry = ({ closure }: MonthEntry, things: Things): string =>
  [...(closure.label ? [closureWords[closure.kind]] : []), nameOfThing(things, closure)].join(', ');

/** When on that day: `7:00 to 9:00`, `from 12:00`, `until 6:00`, `all day`. */
export function sayEntryTime(entry: MonthEntry, day: string, { time }: Formats): string {
  const isFirst = entry.firstDay === day;
  const isLast = entry.lastDay === day;
  if (entry.allDay || (!isFirst && !isLast)) return 'all day';
  if (isFirst && isLast) return `${time(entry.from)} to ${time(entry.to)}`;
  return isFirst ? `from ${time(entry.from)}` : `until ${time(entry.to)}`;
}

/** Hours of a day, a line a span; `closed`, and nothing for a day that is past. */
export function sayHours({ day, hours, isShut }: MonthDay, { time, dayOf }: Formats): string[] {
  if (isShut) return ['closed'];
  return (hours ?? []).map(({ from, to }) =>
    dayOf(from) < day ? `until ${time(to)}` : `${time(from)} to ${time(to)}`,
  );
}
