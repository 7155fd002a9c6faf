import { describe, expect, it } from 'vitest';
import { equivalentMinutes } from '#chemistry/cure/equivalent-minutes.ts';
import { curedAtMinute, cureCurve } from './trace.ts';

const scale = { referenceCelsius: 60, kilojoulesPerMole: 50 };
const row = (minutes: number, metalCelsius: number) => ({ minutes, metalCelsius });

describe('the curve of cure along a trace', () => {
  // Quadrature outside the program: a linear ramp from 20 to 60 C in 10 min is worth 3.8946 min at 60 C with
  // 50 kJ/mol, a cool from 60 to 25 C in 15 min 6.4584; a hold is worth its own minutes.
  const bake = [row(0, 20), row(10, 60), row(30, 60), row(45, 25)];

  it('ends at the sum of ramp, hold and cool', () => {
    const curve = cureCurve(bake, scale, 0);
    expect(curve.map(({ done }) => Number(done.toFixed(4)))).toEqual([0, 3.8946, 23.8946, 30.3531]);
  });

  it('begins with what earlier bakes were worth, and never falls', () => {
    const curve = cureCurve(bake, scale, 12);
    expect(curve[0]?.done).toBe(12);
    for (const [i, { done }] of curve.entries()) expect(done).toBeGreaterThanOrEqual(curve[i - 1]?.done ?? 0);
  });

  it('is the whole in a few hundred moments however long the trace is', () => {
    const long = Array.from({ length: 10_001 }, (_, i) => row(i / 100, 40 + 20 * Math.sin(i / 900)));
    const curve = cureCurve(long, scale, 0);
    expect(curve.length).toBeLessThanOrEqual(302);
    expect(curve.at(-1)?.done).toBeCloseTo(equivalentMinutes(long, scale), 9);
    expect(curve.at(-1)?.minutes).toBe(100);
  });

  it('tells when the need was met, or that it was not', () => {
    const curve = cureCurve(bake, scale, 0);
    expect(curedAtMinute(curve, 13.8946)).toBeCloseTo(20, 3);
    expect(curedAtMinute(curve, 31)).toBeNull();
    expect(cureCurve([], scale, 0)).toEqual([]);
  });
});
