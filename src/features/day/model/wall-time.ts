import { TZDate } from '@date-fns/tz';
import { tzOffset } from '@date-fns/tz';

export const minuteMs = 60_000;
export const dayMs = 86_400_000;

// Zones change their offset on quarter hours only, and asking Intl for each of some thousand instants is slow.
const bucketMs = 15 * minuteMs;
const offsets = new Map<string, Map<number, number>>();

/** Minutes the zone is ahead of UTC at an instant (ms since 1970). */
export function offsetMinutes(zone: string, at: number): number {
  let known = offsets.get(zone);
  if (!known) offsets.set(zone, (known = new Map()));
  const bucket = Math.floor(at / bucketMs);
  let offset = known.get(bucket);
  if (offset === undefined) known.set(bucket, (offset = tzOffset(zone, new Date(at))));
  return offset;
}

/** What the clock on the shop's wall shows, as milliseconds counted as if that were UTC. */
export const wallMs = (zone: string, at: number): number => at + offsetMinutes(zone, at) * minuteMs;

/** `2026-03-12` in the zone at an instant. */
export const localDayOf = (zone: string, at: number): string => new Date(wallMs(zone, at)).toISOString().slice(0, 10);

/** Instant (ms) at which the shop's clock shows that day and minute; the first one where it shows it twice. */
export function instantOf(zone: string, day: string, minute = 0): number {
  const [year = 1970, month = 1, date = 1] = day.split('-').map(Number);
  const guess = new TZDate(year, month - 1, date, Math.floor(minute / 60), minute % 60, zone).getTime();
  const hourBefore = guess - 60 * minuteMs;
  return wallMs(zone, hourBefore) === wallMs(zone, guess) ? hourBefore : guess;
}
