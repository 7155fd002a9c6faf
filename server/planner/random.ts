/** Numbers in [0, 1), always the same for one seed. */
export type Random = () => number;

/** Mulberry32: 32 bits of state, fast, good enough to drive a search. */
export function makeRandom(seed: number): Random {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** A whole number in [0, below). */
export const below = (random: Random, n: number): number => Math.floor(random() * n);
