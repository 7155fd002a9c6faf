type Stretch = { from: number; to: number };

/** Sorts stretches into as few lanes as they need so that none overlap: the lane of each, in the given order. */
export function lanesOf(stretches: readonly Stretch[]): number[] {
  const order = stretches.map((_, i) => i).sort((a, b) => (stretches[a]?.from ?? 0) - (stretches[b]?.from ?? 0));
  const ends: number[] = [];
  const lanes: number[] = stretches.map(() => 0);
  for (const i of order) {
    const { from, to } = stretches[i] ?? { from: 0, to: 0 };
    const free = ends.findIndex((end) => end <= from);
    const lane = free === -1 ? ends.length : free;
    ends[lane] = to;
    lanes[i] = lane;
  }
  return lanes;
}
