import { tzOffset } from '@date-fns/tz';

export const minuteMs = 60_000;
export const dayMs = 86_400_000;

// Zones change their offset on quarter hours only, and asking Intl for each of some thousand instants is slow.
const bucketMs = 15 * minuteMs;
const offsets = new Map<string, Map<number, number>>();

/** Minutes the zone is ahead of UTC at an instant (ms since 1970). */
export function offsetMinutes(zone: string, at: number): number {
  let known = offsets.get(zone);
  if (!known) offsets.set(zone, (known = new Map<number, number>()));
  const bucket = Math.floor(at / bucketMs);
  let offset = known.get(bucket);
  if (offset === undefined) known.set(bucket, (offset = tzOffset(zone, new Date(at))));
  return offset;
}

/** What the clock on the shop's wall shows, as milliseconds counted as if that were UTC. */
export const wallMs = (zone: string, at: number): number => at + offsetMinutes(zone, at) * minuteMs;
