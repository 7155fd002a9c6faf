export type WindowTone = 'room' | 'closing' | 'outside';
type Ends = { earliest: string | null; latest: string | null };

const quarterHour = 15 * 60_000;

/**
 * How a start sits in its window: `outside` of it, `closing` with less than a quarter of the window or 15 min left to
 * its end, else `room`.
 */
export function windowTone({ earliest, latest }: Ends, start: string | number): WindowTone {
  const at = new Date(start).getTime();
  const from = earliest === null ? -Infinity : Date.parse(earliest);
  const to = latest === null ? Infinity : Date.parse(latest);
  if (at < from || at > to) return 'outside';
  const left = to - at;
  // Without an earliest start there is no quarter to speak of.
  const quarter = Number.isFinite(from) ? (to - from) / 4 : 0;
  return left < Math.max(quarter, quarterHour) && Number.isFinite(left) ? 'closing' : 'room';
}
