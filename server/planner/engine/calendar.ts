import { joined } from '../intervals.ts';
import type { Interval } from '../types.ts';
import { firstEnding, type Track } from './track.ts';

/** Later than everything: no such time. */
export const NEVER = 1_000_000_000;

/** Intervals, sorted and apart. */
export type Calendar = { n: number; from: Int32Array; to: Int32Array };

export function makeCalendar(list: readonly Interval[]): Calendar {
  const apart = joined(list);
  return {
    n: apart.length,
    from: Int32Array.from(apart, (x) => x[0]),
    to: Int32Array.from(apart, (x) => x[1]),
  };
}

/** Index of the first interval that ends after `at`. */
export function firstAfter(c: Calendar, at: number): number {
  let lo = 0;
  let hi = c.n;
  while (lo < hi) {
    const mid = (lo + hi) >> 1;
    if (c.to[mid]! <= at) lo = mid + 1;
    else hi = mid;
  }
  return lo;
}

/** The earliest minute from `at` on with `minutes` in one interval; NEVER if there is none. */
export function nextWithin(c: Calendar, at: number, minutes: number): number {
  for (let i = firstAfter(c, at); i < c.n; i++) {
    const from = Math.max(at, c.from[i]!);
    if (from + minutes <= c.to[i]!) return from;
  }
  return NEVER;
}

/** The earliest minute from `at` on with `minutes` in one interval, in which the track has no use. */
export function nextFree(c: Calendar, busy: Track, at: number, minutes: number): number {
  let i = firstAfter(c, at);
  let j = firstEnding(busy, at);
  let from = at;
  while (i < c.n) {
    if (c.from[i]! > from) from = c.from[i] as number;
    if (from + minutes > c.to[i]!) {
      i++;
      continue;
    }
    while (j < busy.n && busy.to[j]! <= from) j++;
    if (j >= busy.n || busy.from[j]! >= from + minutes) return from;
    from = busy.to[j] as number;
    while (i < c.n && c.to[i]! <= from) i++;
  }
  return NEVER;
}

/** End of work of `minutes` that begins at `from` (within interval `i`) and pauses between intervals. */
export function endPaused(c: Calendar, i: number, from: number, minutes: number): number {
  let left = minutes;
  let at = from;
  for (let k = i; k < c.n; k++) {
    if (c.from[k]! > at) at = c.from[k] as number;
    const room = c.to[k]! - at;
    if (left <= room) return at + left;
    left -= room;
  }
  return NEVER;
}

/** Like `nextFree`, for work that pauses between intervals: all its working minutes are free. Minutes above 0. */
export function nextFreePaused(c: Calendar, busy: Track, at: number, minutes: number): number {
  let from = at;
  for (;;) {
    const i = firstAfter(c, from);
    if (i >= c.n) return NEVER;
    if (c.from[i]! > from) from = c.from[i] as number;
    const end = endPaused(c, i, from, minutes);
    if (end === NEVER) return NEVER;
    const j = firstEnding(busy, from);
    if (j >= busy.n || busy.from[j]! >= end) return from;
    from = busy.to[j] as number;
  }
}
