import fc from 'fast-check';
import { expect, test } from 'vitest';
import { lanesOf } from './lanes.ts';

const stretch = fc
  .tuple(fc.nat(200), fc.integer({ min: 1, max: 40 }))
  .map(([from, length]) => ({ from, to: from + length }));

test('no two in a lane overlap, and there are as many lanes as there ever are at once', () => {
  // Interval partitioning: the least number of lanes equals the greatest overlap (e.g. Kleinberg and Tardos, section 4.1).
  fc.assert(
    fc.property(fc.array(stretch, { maxLength: 30 }), (stretches) => {
      const lanes = lanesOf(stretches);
      let deepest = 0;
      for (const [i, a] of stretches.entries()) {
        deepest = Math.max(deepest, stretches.filter((b) => b.from <= a.from && a.from < b.to).length);
        for (const [j, b] of stretches.entries())
          if (i < j && lanes[i] === lanes[j]) expect(a.to <= b.from || b.to <= a.from).toBe(true);
      }
      expect(new Set(lanes).size).toBe(deepest);
    }),
    { seed: 7, numRuns: 300 },
  );
});
