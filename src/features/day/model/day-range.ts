import { addDays, mondayOf } from '#src/lib/calendar-days.ts';
import { instantOf } from '#src/lib/wall-clock.ts';

export const spans = ['day', 'three', 'week'] as const;
/** How much of the calendar is shown at once. */
export type SpanKind = (typeof spans)[number];

const length: Record<SpanKind, number> = { day: 1, three: 3, week: 7 };

/** The calendar days shown for a date: the day, three from it on, or its week from Monday. */
export function daysShown(date: string, kind: SpanKind): string[] {
  const first = kind === 'week' ? mondayOf(date) : date;
  return Array.from({ length: length[kind] }, (_, i) => addDays(first, i));
}

export const step = (date: string, kind: SpanKind, direction: 1 | -1): string =>
  addDays(date, direction * length[kind]);

/** From the first day's midnight to the midnight after the last, in the shop's zone: 23 to 25 hours a day. */
export function rangeOf(days: readonly string[], zone: string): { from: string; to: string } {
  const first = days[0] ?? '1970-01-01';
  const last = days.at(-1) ?? first;
  return {
    from: new Date(instantOf(first, 0, zone)).toISOString(),
    to: new Date(instantOf(addDays(last, 1), 0, zone)).toISOString(),
  };
}
