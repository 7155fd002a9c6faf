import type { ReplyOf } from '#contracts/endpoint.ts';
import type { Closure, readHours } from '#contracts/hours.ts';
import { addDays } from '#src/lib/calendar-days.ts';
import { instantOf, localDayOf, minuteOfDay } from '#src/lib/wall-clock.ts';
import { timesBetween, type Times } from '../../parts/recurrence-dates.ts';
import { weekdayOf } from '../../parts/recurrence.ts';

export type Hours = ReplyOf<typeof readHours>;
/** One time of a closure. `firstDay` to `lastDay` are the days of the calendar on which it lies. */
export type MonthEntry = Times & {
  key: string;
  closure: Closure;
  firstDay: string;
  lastDay: string;
  allDay: boolean;
};
export type MonthDay = {
  day: string;
  /**
   * When the shop is open: spans that begin on this day, or the one from the day before where none does. Null for days
   * that are past, whose hours may have been others.
   */
  hours: Times[] | null;
  isShut: boolean;
  entries: MonthEntry[];
};
export type Month = { days: MonthDay[]; entries: MonthEntry[] };

export const isMonth = (text: string | null): text is string => text !== null && /^\d{4}-(0[1-9]|1[0-2])$/.test(text);

/** `2026-12` and so many months on. */
export function addMonths(month: string, months: number): string {
  const count = Number(month.slice(0, 4)) * 12 + Number(month.slice(5)) - 1 + months;
  return `${String(Math.floor(count / 12)).padStart(4, '0')}-${String((count % 12) + 1).padStart(2, '0')}`;
}

/** `December 2026`. */
export const sayMonth = (month: string): string =>
  new Intl.DateTimeFormat('en-GB', { timeZone: 'UTC', month: 'long', year: 'numeric' }).format(
    new Date(`${month}-01T12:00Z`),
  );

/** The days of a month as the shop has them: its hours without what closes all of it, and what is closed when. */
export function monthOf(hours: Hours, month: string, { zone, today }: { zone: string; today: string }): Month {
  const days = daysOf(month);
  const start = (day: string) => instantOf(day, 0, zone);
  const [first, end] = [start(`${month}-01`), start(`${addMonths(month, 1)}-01`)];
  const entries = hours.closures
    .flatMap((closure) => timesBetween(closure, zone, first, end).map((times) => entryOf(closure, times, zone)))
    .toSorted((a, b) => a.from.getTime() - b.from.getTime() || b.to.getTime() - a.to.getTime());
  const shut = entries.filter(({ closure }) => closure.placeId === null && closure.lampId === null);
  const open = openings(hours, days, zone)
    .flatMap((span) => without(span, shut))
    .toSorted((a, b) => a.from.getTime() - b.from.getTime());
  return {
    entries,
    days: days.map((day) => {
      const [from, to] = [new Date(start(day)), new Date(start(addDays(day, 1)))];
      const here = open.filter((span) => span.from < to && span.to > from);
      const begun = here.filter((span) => span.from >= from);
      const isPast = day < today;
      return {
        day,
        hours: isPast ? null : joined(begun.length > 0 ? begun : here),
        isShut: isPast ? without({ from, to }, shut).length === 0 : here.length === 0,
        entries: entries.filter((entry) => entry.firstDay <= day && entry.lastDay >= day),
      };
    }),
  };
}

function daysOf(month: string): string[] {
  const next = `${addMonths(month, 1)}-01`;
  const days: string[] = [];
  for (let day = `${month}-01`; day < next; day = addDays(day, 1)) days.push(day);
  return days;
}

function entryOf(closure: Closure, { from, to }: Times, zone: string): MonthEntry {
  return {
    key: `${closure.id} ${from.toISOString()}`,
    closure,
    from,
    to,
    firstDay: localDayOf(from.getTime(), zone),
    lastDay: localDayOf(to.getTime() - 1, zone),
    allDay: minuteOfDay(from.getTime(), zone) === 0 && minuteOfDay(to.getTime(), zone) === 0,
  };
}

/** Of the week and beside it, from the night before the first day on. */
function openings({ week, next, extra }: Hours, days: readonly string[], zone: string): Times[] {
  const [first = '', last = ''] = [days[0], days.at(-1)];
  const usual = [addDays(first, -1), ...days].flatMap((day) =>
    (next && day >= next.from ? next.week : week)
      .filter((span) => span.day === weekdayOf(day))
      .map(({ from, to }) => ({ from: new Date(instantOf(day, from, zone)), to: new Date(instantOf(day, to, zone)) })),
  );
  const [from, to] = [instantOf(first, 0, zone), instantOf(addDays(last, 1), 0, zone)];
  return [...usual, ...extra.flatMap((opening) => timesBetween(opening, zone, from, to))];
}

/** What is left of a span. */
const without = (span: Times, taken: readonly Times[]): Times[] =>
  taken.reduce<Times[]>(
    (left, cut) =>
      left.flatMap(({ from, to }) =>
        cut.to <= from || cut.from >= to
          ? [{ from, to }]
          : [
              { from, to: cut.from },
              { from: cut.to, to },
            ].filter((piece) => piece.from < piece.to),
      ),
    [span],
  );

/** Spans that meet are one; they come in their order. */
const joined = (spans: readonly Times[]): Times[] =>
  spans.reduce<Times[]>((done, span) => {
    const last = done.at(-1);
    if (!last || last.to < span.from) return [...done, span];
    return [...done.slice(0, -1), { from: last.from, to: last.to > span.to ? last.to : span.to }];
  }, []);
