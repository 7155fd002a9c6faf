import type { Interval, Minutes } from './types.ts';

export const overlaps = (from: Minutes, to: Minutes, other: Interval): boolean => from < other[1] && other[0] < to;

/** Whether `[from, to)` lies in the union of the intervals; an empty one always does. */
export function liesWithin(from: Minutes, to: Minutes, list: readonly Interval[]): boolean {
  let at = from;
  for (const [s, e] of [...list].sort((x, y) => x[0] - y[0])) {
    if (at >= to) break;
    if (s <= at && e > at) at = e;
  }
  return at >= to;
}

export const minutesWithin = (from: Minutes, to: Minutes, list: readonly Interval[]): Minutes =>
  list.reduce((sum, [s, e]) => sum + Math.max(0, Math.min(to, e) - Math.max(from, s)), 0);

/** Sorted, without overlaps, touching neighbours joined, empty ones left out. */
export function joined(list: readonly Interval[]): Interval[] {
  const out: [Minutes, Minutes][] = [];
  for (const [s, e] of [...list].sort((x, y) => x[0] - y[0])) {
    const last = out[out.length - 1];
    if (s >= e) continue;
    if (last && s <= last[1]) last[1] = Math.max(last[1], e);
    else out.push([s, e]);
  }
  return out;
}

type Use = { from: Minutes; to: Minutes; amount: number; fixed: boolean };

/** The new uses, last comer first, that stand at a minute where all uses together exceed the limit. */
export function overfilled<T extends Use>(uses: readonly T[], limit: number): Set<T> {
  const bad = new Set<T>();
  for (const at of new Set(uses.map((u) => u.from))) {
    const on = uses.filter((u) => u.from <= at && at < u.to);
    const loose = on.filter((u) => !u.fixed);
    const last = loose[loose.length - 1];
    // Kilowatts may be fractions: 1e-9 forgives the last bit of a sum.
    if (last && on.reduce((sum, u) => sum + u.amount, 0) > limit + 1e-9) bad.add(last);
  }
  return bad;
}
