/**
 * Which blocks run as one load: each block names the next of its load, the last the first again; one that runs alone
 * names itself.
 */
export type Ring = Int32Array;

export const makeRing = (blocks: number): Ring => Int32Array.from({ length: blocks }, (_, id) => id);

export function resetRing(ring: Ring): void {
  for (let id = 0; id < ring.length; id++) ring[id] = id;
}

/** Makes one load of the loads of two blocks; nothing where they are one already. */
export function joinRings(ring: Ring, a: number, b: number): void {
  for (let id = ring[a]!; id !== a; id = ring[id]!) if (id === b) return;
  if (a === b) return;
  const next = ring[a]!;
  ring[a] = ring[b]!;
  ring[b] = next;
}

/** Takes one block out of its load; the others stay together. */
export function leaveRing(ring: Ring, id: number): void {
  let before = id;
  while (ring[before] !== id) before = ring[before]!;
  ring[before] = ring[id]!;
  ring[id] = id;
}

/** Ends a load: each of its blocks runs alone. */
export function breakRing(ring: Ring, id: number): void {
  while (ring[id] !== id) leaveRing(ring, ring[id]!);
}

/** The load's first block by number, which holds place, person and lamps. */
export function leaderOf(ring: Ring, id: number): number {
  let least = id;
  for (let other = ring[id]!; other !== id; other = ring[other]!) if (other < least) least = other;
  return least;
}
