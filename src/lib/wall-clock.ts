import { tzOffset } from '@date-fns/tz';

const minute = 60_000;
const day = 1440 * minute;

/** Minutes the zone is ahead of UTC at an instant. */
const offsetAt = (zone: string, at: number): number => tzOffset(zone, new Date(at));

/** What the clock on the shop's wall shows at an instant, in milliseconds counted as if that were UTC. */
export const wallOf = (at: number, zone: string): number => at + offsetAt(zone, at) * minute;

/** `2026-03-12` on the shop's calendar. */
export const localDayOf = (at: number, zone: string): string => new Date(wallOf(at, zone)).toISOString().slice(0, 10);

/** Minutes since local midnight that the shop's clock shows. */
export const minuteOfDay = (at: number, zone: string): number => {
  const wall = wallOf(at, zone);
  return Math.floor((((wall % day) + day) % day) / minute);
};

/**
 * The instant (ms) at which the shop's clock shows that day and minute. RFC 5545, 3.3.5: a time that comes twice is the
 * first of the two, a time that is skipped is read with the offset before the gap.
 */
export function instantOf(localDay: string, minutes: number, zone: string): number {
  const wall = Date.parse(`${localDay}T00:00:00Z`) + minutes * minute;
  if (Number.isNaN(wall)) throw new RangeError(`Not a day: ${localDay}`);
  const before = offsetAt(zone, wall - day);
  const after = offsetAt(zone, wall + day);
  const early = wall - before * minute;
  if (before === after || offsetAt(zone, early) === before) return early;
  const late = wall - after * minute;
  return offsetAt(zone, late) === after ? late : early;
}
