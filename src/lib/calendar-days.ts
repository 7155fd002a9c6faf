import { addDays as addTo, differenceInCalendarDays, formatISO, parseISO, startOfISOWeek } from 'date-fns';

// Days of a calendar, `2026-03-12`: no hours and no zone, so each is the same wherever it is worked out.
const written = (date: Date): string => formatISO(date, { representation: 'date' });

/** The day that many days on. @throws {RangeError} where the text is no day. */
export const addDays = (day: string, days: number): string => written(addTo(parseISO(day), days));

/** Monday of the week (ISO 8601) in which the day lies. */
export const mondayOf = (day: string): string => written(startOfISOWeek(parseISO(day)));

/** How many days lie from the first to the last, both included; below 1 where they are the wrong way round. */
export const daysFromTo = (first: string, last: string): number =>
  differenceInCalendarDays(parseISO(last), parseISO(first)) + 1;
