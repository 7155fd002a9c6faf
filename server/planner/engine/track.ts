/**
 * Sorted uses of one resource: `[from, to)` and two numbers beside each. Tracks of exclusive resources never hold
 * overlapping uses, so their ends ascend too; shared ones (racks, circuits, zones) may.
 */
export type Track = {
  n: number;
  from: Int32Array;
  to: Int32Array;
  a: Float64Array;
  b: Int32Array;
  /** No use so far was longer; lets a search in a shared track skip what ended long ago. */
  longest: number;
};

export const makeTrack = (room = 16): Track => ({
  n: 0,
  from: new Int32Array(room),
  to: new Int32Array(room),
  a: new Float64Array(room),
  b: new Int32Array(room),
  longest: 0,
});

function grow(t: Track): void {
  const room = t.from.length * 2;
  const wider = <T extends Int32Array | Float64Array>(old: T, made: T): T => {
    made.set(old);
    return made;
  };
  t.from = wider(t.from, new Int32Array(room));
  t.to = wider(t.to, new Int32Array(room));
  t.a = wider(t.a, new Float64Array(room));
  t.b = wider(t.b, new Int32Array(room));
}

/** Index of the first use that starts at or after `at`. */
export function firstFrom(t: Track, at: number): number {
  const from = t.from;
  let lo = 0;
  let hi = t.n;
  while (lo < hi) {
    const mid = (lo + hi) >> 1;
    if (from[mid]! < at) lo = mid + 1;
    else hi = mid;
  }
  return lo;
}

/** Index of the first use that ends after `at`; exclusive tracks only. */
export function firstEnding(t: Track, at: number): number {
  const to = t.to;
  let lo = 0;
  let hi = t.n;
  while (lo < hi) {
    const mid = (lo + hi) >> 1;
    if (to[mid]! <= at) lo = mid + 1;
    else hi = mid;
  }
  return lo;
}

/** Index from which uses of a shared track may still reach past `at`. */
export const firstReaching = (t: Track, at: number): number => firstFrom(t, at - t.longest);

export function insertUse(t: Track, from: number, to: number, a: number, b: number): void {
  if (t.n === t.from.length) grow(t);
  let i = t.n;
  while (i > 0) {
    const f = t.from[i - 1] as number;
    if (f < from || (f === from && t.to[i - 1]! <= to)) break;
    t.from[i] = f;
    t.to[i] = t.to[i - 1] as number;
    t.a[i] = t.a[i - 1] as number;
    t.b[i] = t.b[i - 1] as number;
    i--;
  }
  t.from[i] = from;
  t.to[i] = to;
  t.a[i] = a;
  t.b[i] = b;
  t.n++;
  if (to - from > t.longest) t.longest = to - from;
}

/** Takes out the use with these four numbers; it must be there. */
export function removeUse(t: Track, from: number, to: number, a: number, b: number): void {
  let i = firstFrom(t, from);
  while (i < t.n && (t.to[i] !== to || t.a[i] !== a || t.b[i] !== b)) i++;
  const n = --t.n;
  for (; i < n; i++) {
    t.from[i] = t.from[i + 1] as number;
    t.to[i] = t.to[i + 1] as number;
    t.a[i] = t.a[i + 1] as number;
    t.b[i] = t.b[i + 1] as number;
  }
}
