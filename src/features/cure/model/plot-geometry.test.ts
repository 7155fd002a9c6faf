import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { pathOf, scale, spanOf, thinned, ticks } from './plot-geometry.ts';

describe('ticks', () => {
  it('are round figures within the span', () => {
    expect(ticks({ from: 18, to: 83 }, 5)).toEqual([20, 40, 60, 80]);
    expect(ticks({ from: 0, to: 0.5 }, 5)).toEqual([0, 0.1, 0.2, 0.3, 0.4, 0.5]);
    expect(ticks({ from: 7, to: 7 }, 5)).toEqual([7]);
  });
});

describe('scales', () => {
  it('map ends to ends, upside down as well, and a level line to the middle', () => {
    expect(scale({ from: 0, to: 10 }, { from: 100, to: 0 })(2.5)).toBe(75);
    expect(scale({ from: 5, to: 5 }, { from: 0, to: 100 })(5)).toBe(50);
    expect(spanOf([])).toEqual({ from: 0, to: 1 });
    expect(spanOf([10, 20], 0.1)).toEqual({ from: 9, to: 21 });
  });
  it('make a path', () => {
    expect(
      pathOf([
        { x: 0, y: 1 },
        { x: 2.25, y: 3 },
      ]),
    ).toBe('M0.0 1.0L2.3 3.0');
  });
});

describe('thinning a line', () => {
  it('keeps ends, the lowest and the highest point, and the order, in a few points', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -50, max: 300 }), { minLength: 1, maxLength: 600 }), (values) => {
        const points = values.map((y, x) => ({ x, y }));
        const kept = thinned(points, 40);
        expect(kept.length).toBeLessThanOrEqual(82);
        expect(kept[0]).toBe(points[0]);
        expect(kept.at(-1)).toBe(points.at(-1));
        expect(Math.max(...kept.map(({ y }) => y))).toBe(Math.max(...values));
        expect(Math.min(...kept.map(({ y }) => y))).toBe(Math.min(...values));
        for (const [i, { x }] of kept.entries()) expect(x).toBeGreaterThan(kept[i - 1]?.x ?? -1);
      }),
    );
  });
});
