import type { Interval, Minutes } from './types.ts';

export const overlaps = (from: Minutes, to: Minutes, other: Interval): boolean => from < other[1] && other[0] < to;

const sortedLists = new WeakMap<readonly Interval[], Interval[]>();

/** The joined form of a list, made once for each list: calendars are asked thousands of times. */
function joinedOnce(list: readonly Interval[]): Interval[] {
  const known = sortedLists.get(list);
  if (known) return known;
  const made = joined(list);
  sortedLists.set(list, made);
  return made;
}

/** Index of the first interval of a joined list that ends after `at`. */
function firstAfter(list: readonly Interval[], at: Minutes): number {
  let lo = 0;
  let hi = list.length;
  while (lo < hi) {
    const mid = (lo + hi) >> 1;
    if (list[mid]![1] <= at) lo = mid + 1;
    else hi = mid;
  }
  return lo;
}

/** Whether `[from, to)` lies in the union of the intervals; an empty one always does. */
export function liesWithin(from: Minutes, to: Minutes, list: readonly Interval[]): boolean {
  if (from >= to) return true;
  const apart = joinedOnce(list);
  const one = apart[firstAfter(apart, from)];
  return one !== undefined && one[0] <= from && one[1] >= to;
}

/** The parts of the intervals inside `[from, to)`; they do not overlap (working time never does). */
export function partsWithin(from: Minutes, to: Minutes, list: readonly Interval[]): Interval[] {
  const apart = joinedOnce(list);
  const parts: Interval[] = [];
  for (let i = firstAfter(apart, from); i < apart.length && apart[i]![0] < to; i++)
    parts.push([Math.max(apart[i]![0], from), Math.min(apart[i]![1], to)]);
  return parts;
}

export const minutesWithin = (from: Minutes, to: Minutes, list: readonly Interval[]): Minutes =>
  partsWithin(from, to, list).reduce((sum, [s, e]) => sum + e - s, 0);

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
  const byStart = uses.map((use, i) => ({ use, i })).sort((x, y) => x.use.from - y.use.from);
  let on: typeof byStart = [];
  byStart.forEach((next, k) => {
    const at = next.use.from;
    on = on.filter(({ use }) => use.to > at);
    if (next.use.to > at) on.push(next);
    if (byStart[k + 1]?.use.from === at) return; // more begin at this minute
    // Kilowatts may be fractions: 1e-9 forgives the last bit of a sum.
    if (on.reduce((sum, { use }) => sum + use.amount, 0) <= limit + 1e-9) return;
    const loose = on.filter(({ use }) => !use.fixed);
    if (loose.length) bad.add(loose.reduce((last, x) => (x.i > last.i ? x : last)).use);
  });
  return bad;
}
