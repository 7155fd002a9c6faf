import { tzOffset } from '@date-fns/tz';

const MINUTE = 60_000;
const DAY = 24 * 60 * MINUTE;

/**
 * Floating time: what the clock on the wall shows, kept as if it were UTC, in milliseconds. Sums and recurrence rules
 * are worked out in it and turned into instants last, so no result depends on the zone the process runs in.
 */
export type Floating = number;

/** @throws {RangeError} where the text is no local time `YYYY-MM-DDTHH:MM`. */
export function readLocal(text: string): Floating {
  const floating = Date.parse(`${text}:00Z`);
  if (Number.isNaN(floating)) throw new RangeError(`Not a local time: ${text}`);
  return floating;
}

export function floatingOf(instant: Date, zone: string): Floating {
  return instant.getTime() + offsetAt(instant.getTime(), zone) * MINUTE;
}

/**
 * The instant at which the wall clock of `zone` shows a time. RFC 5545, 3.3.5: a time that comes twice is the first of
 * the two; a time that is skipped is read with the offset before the gap. Both are the offset before the change.
 */
export function instantOf(floating: Floating, zone: string): Date {
  const before = offsetAt(floating - DAY, zone);
  const after = offsetAt(floating + DAY, zone);
  const early = floating - before * MINUTE;
  if (before === after || offsetAt(early, zone) === before) return new Date(early);
  const late = floating - after * MINUTE;
  return new Date(offsetAt(late, zone) === after ? late : early);
}

/** The day on the shop's calendar, `YYYY-MM-DD`. */
export function localDayOf(instant: Date, zone: string): string {
  return new Date(floatingOf(instant, zone)).toISOString().slice(0, 10);
}

/** Local midnight to the next: 23, 24 or 25 hours (or half an hour off, on Lord Howe). */
export function spanOfLocalDay(day: string, zone: string): { from: Date; to: Date } {
  const midnight = readLocal(`${day}T00:00`);
  return { from: instantOf(midnight, zone), to: instantOf(midnight + DAY, zone) };
}

/** Minutes ahead of UTC. @throws {RangeError} for a zone that does not exist. */
function offsetAt(ms: number, zone: string): number {
  const offset = tzOffset(zone, new Date(ms));
  if (Number.isNaN(offset)) throw new RangeError(`Not a time zone: ${zone}`);
  return offset;
}
