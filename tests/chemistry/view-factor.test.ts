import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { viewFactor } from '#chemistry/infrared/view-factor.ts';
import { holds } from './holds.ts';

const facing = (widthMetres: number, heightMetres: number, distanceMetres: number) =>
  viewFactor({ widthMetres, heightMetres, distanceMetres });

/** The double area integral itself, folded to two dimensions and summed by midpoints: no closed form in it. */
function byIntegration(width: number, height: number, distance: number, cells: number): number {
  let sum = 0;
  for (let i = 0; i < cells; i += 1) {
    const u = ((i + 0.5) * width) / cells;
    for (let j = 0; j < cells; j += 1) {
      const v = ((j + 0.5) * height) / cells;
      sum += ((width - u) * (height - v)) / (u * u + v * v + distance * distance) ** 2;
    }
  }
  return (4 * sum * distance * distance) / (Math.PI * cells * cells);
}

describe('view factor of equal, aligned, parallel rectangles', () => {
  // Howell C-11; Incropera, table 13.2 and figure 13.4.
  it.each([
    [1, 1.5, 0.5, 0.4756],
    [1, 1, 1, 0.1998],
    [2, 2, 1, 0.4153],
  ])('%d x %d at %d is %d', (width, height, distance, expected) => {
    expect(facing(width, height, distance)).toBeCloseTo(expected, 4);
  });

  // The same formula, reckoned apart from this code.
  it.each([
    [0.6, 0.23305],
    [0.7, 0.19261],
    [0.8, 0.16118],
  ])('1.0 x 0.5 m at %d m is %d', (distance, expected) => {
    expect(facing(1, 0.5, distance)).toBeCloseTo(expected, 5);
  });

  it('agrees with the double area integral', () => {
    for (const [width, height, distance] of [
      [1, 0.5, 0.7],
      [2, 0.3, 0.4],
      [0.05, 0.02, 1],
      [0.005, 0.002, 1],
    ] as const) {
      const ratio = facing(width, height, distance) / byIntegration(width, height, distance, 400);
      expect(Math.abs(ratio - 1), `${width} x ${height} at ${distance}`).toBeLessThan(1e-4);
    }
  });

  it('joins closed form and far series without a step', () => {
    const size = Math.sqrt(1e-5 / 2);
    const [near, far] = [facing(size * (1 + 1e-7), size, 1), facing(size * (1 - 1e-7), size, 1)];
    expect(Math.abs(near / far - 1)).toBeLessThan(1e-6);
    expect(near).toBeGreaterThan(far);
  });

  it('goes to 1 when touching and to A / (pi c2) when far', () => {
    expect(facing(1, 1, 1e-6)).toBeCloseTo(1, 4);
    expect(facing(1, 0.5, 1000) / (0.5 / (Math.PI * 1e6))).toBeCloseTo(1, 6);
    expect(facing(1, 0.5, 1e9)).toBeGreaterThan(0);
  });

  it('is a share, and never more when farther', () => {
    const side = fc.double({ min: 0.01, max: 5, noNaN: true });
    holds(
      fc.property(
        side,
        side,
        side,
        fc.double({ min: 1.001, max: 100, noNaN: true }),
        (width, height, distance, farther) => {
          const near = facing(width, height, distance);
          expect(near).toBeGreaterThan(0);
          expect(near).toBeLessThanOrEqual(1);
          expect(facing(width, height, distance * farther)).toBeLessThan(near);
          expect(facing(height, width, distance) / near).toBeCloseTo(1, 9);
        },
      ),
    );
  });
});
