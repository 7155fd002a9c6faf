import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { addBakes } from '#chemistry/cure/add-bakes.ts';
import { timeRatio } from '#chemistry/cure/arrhenius.ts';
import { equivalentMinutes } from '#chemistry/cure/equivalent-minutes.ts';
import { judgeBake } from '#chemistry/cure/judge-bake.ts';
import { cureKinetics } from '#chemistry/cure/kinetics.ts';
import { hold, type TraceRow } from '#chemistry/cure/trace.ts';
import { rampInClosedForm } from './exponential-integral.ts';
import { holds } from './holds.ts';

const at60 = { referenceCelsius: 60, kilojoulesPerMole: 50 };
const row = (minutes: number, metalCelsius: number): TraceRow => ({ minutes, metalCelsius });

describe('equivalent minutes of a trace', () => {
  it('counts a linear 20 to 60 C ramp of 10 min as 3.8946 min at 60 C (reckoned apart from this code)', () => {
    expect(equivalentMinutes([row(0, 20), row(10, 60)], at60)).toBeCloseTo(3.8946, 4);
  });

  it('counts a linear cool from 60 to 25 C in 15 min as 6.4584 min (reckoned apart from this code)', () => {
    expect(equivalentMinutes([row(0, 60), row(15, 25)], at60)).toBeCloseTo(6.4584, 4);
  });

  it('adds the minutes of a hold to ramp and cooling', () => {
    const trace = [row(0, 20), row(10, 60), row(40, 60), row(55, 25)];
    expect(equivalentMinutes(trace, at60)).toBeCloseTo(3.8946 + 30 + 6.4584, 3);
    expect(equivalentMinutes(hold(60, 30), at60)).toBe(30);
  });

  it('agrees with the closed form by the exponential integral (Abramowitz & Stegun 5.1) to 1e-9', () => {
    for (const energy of [20, 50, 90, 200]) {
      for (const [from, to] of [
        [-20, 120],
        [20, 60],
        [60, 25],
        [10, 40],
      ] as const) {
        const ours = equivalentMinutes([row(0, from), row(12, to)], {
          referenceCelsius: 60,
          kilojoulesPerMole: energy,
        });
        const exact = rampInClosedForm(from, to, 12, 60, energy);
        expect(Math.abs(ours / exact - 1), `${energy} kJ/mol, ${from} to ${to} C`).toBeLessThan(1e-9);
      }
    }
  });

  it('is 0 for nothing, for one row and for a step', () => {
    expect(equivalentMinutes([], at60)).toBe(0);
    expect(equivalentMinutes([row(5, 60)], at60)).toBe(0);
    expect(equivalentMinutes([row(5, 20), row(5, 60)], at60)).toBe(0);
  });

  it('takes a rise as small as a number can hold for a hold', () => {
    const nearly = [row(0, 0), row(10, Number.MIN_VALUE)];
    expect(equivalentMinutes(nearly, at60)).toBeCloseTo(equivalentMinutes(hold(0, 10), at60), 12);
  });

  it('takes 100,000 rows of a logger', () => {
    const rows = Array.from({ length: 100_001 }, (_, index) => row(index / 1000, 20 + index / 2500));
    expect(equivalentMinutes(rows, at60)).toBeCloseTo(rampInClosedForm(20, 60, 100, 60, 50), 8);
  });

  it('names the row that cannot be', () => {
    expect(() => equivalentMinutes([row(0, 20), row(1, NaN)], at60)).toThrow(/metalCelsius of row 2/);
    expect(() => equivalentMinutes([row(0, 20), row(1, -280)], at60)).toThrow(/metalCelsius of row 2/);
    expect(() => equivalentMinutes([row(0, 20), row(NaN, 20)], at60)).toThrow(/minutes of row 2/);
    expect(() => equivalentMinutes([row(1, 20), row(0.5, 20)], at60)).toThrow(/minutes of row 2 must be at least/);
    expect(() => equivalentMinutes([row(Infinity, 20)], at60)).toThrow(/minutes of row 1/);
  });
});

const celsius = fc.double({ min: 0, max: 120, noNaN: true });
const energy = fc.double({ min: 20, max: 90, noNaN: true });
const trace = fc
  .array(fc.tuple(fc.double({ min: 0, max: 30, noNaN: true }), celsius), { minLength: 2, maxLength: 12 })
  .map((steps) => {
    let minutes = 0;
    return steps.map(([pause, metalCelsius]) => row((minutes += pause), metalCelsius));
  });

const close = (left: number, right: number) =>
  expect(Math.abs(left - right)).toBeLessThanOrEqual(1e-9 * Math.max(1e-6, Math.abs(left), Math.abs(right)));

describe('what always holds for cure', () => {
  it('never falls as the bake goes on', () => {
    holds(
      fc.property(trace, energy, (rows, kilojoulesPerMole) => {
        let before = 0;
        for (let length = 1; length <= rows.length; length += 1) {
          const cure = equivalentMinutes(rows.slice(0, length), { referenceCelsius: 60, kilojoulesPerMole });
          expect(cure).toBeGreaterThanOrEqual(before);
          before = cure;
        }
      }),
    );
  });

  it('is never slower when hotter', () => {
    holds(
      fc.property(trace, energy, fc.double({ min: 0, max: 30, noNaN: true }), (rows, kilojoulesPerMole, hotter) => {
        const scale = { referenceCelsius: 60, kilojoulesPerMole };
        const warmed = rows.map(({ minutes, metalCelsius }) => row(minutes, metalCelsius + hotter));
        expect(equivalentMinutes(warmed, scale)).toBeGreaterThanOrEqual(equivalentMinutes(rows, scale) * (1 - 1e-12));
      }),
    );
  });

  it('does not change when a stretch is split', () => {
    holds(
      fc.property(trace, energy, fc.double({ min: 0, max: 1, noNaN: true }), (rows, kilojoulesPerMole, share) => {
        const scale = { referenceCelsius: 60, kilojoulesPerMole };
        const split = rows.flatMap((from, index) => {
          const to = rows[index + 1];
          if (to === undefined) return [from];
          const minutes = from.minutes + share * (to.minutes - from.minutes);
          return [from, row(minutes, from.metalCelsius + share * (to.metalCelsius - from.metalCelsius))];
        });
        close(equivalentMinutes(split, scale), equivalentMinutes(rows, scale));
      }),
    );
  });

  it('has ratios that multiply, and 1 at the reference', () => {
    holds(
      fc.property(celsius, celsius, celsius, energy, (a, b, c, kilojoulesPerMole) => {
        const direct = timeRatio(a, c, kilojoulesPerMole);
        close(timeRatio(a, b, kilojoulesPerMole) * timeRatio(b, c, kilojoulesPerMole), direct);
        expect(timeRatio(a, a, kilojoulesPerMole)).toBe(1);
        if (a < b)
          expect(timeRatio(a, c, kilojoulesPerMole)).toBeGreaterThanOrEqual(timeRatio(b, c, kilojoulesPerMole));
      }),
    );
  });

  it('turns back into the time ratio for a hold', () => {
    holds(
      fc.property(celsius, energy, (held, kilojoulesPerMole) => {
        const cure = equivalentMinutes(hold(held, 30), { referenceCelsius: 60, kilojoulesPerMole });
        close(cure * timeRatio(held, 60, kilojoulesPerMole), 30);
      }),
    );
  });

  it('makes a bake in three goes the sum of its parts', () => {
    holds(
      fc.property(fc.tuple(trace, trace, trace), energy, (bakes, kilojoulesPerMole) => {
        const scale = { referenceCelsius: 60, kilojoulesPerMole };
        const parts = bakes.map((bake) => equivalentMinutes(bake, scale));
        close(
          addBakes(bakes, scale),
          parts.reduce((sum, part) => sum + part, 0),
        );
      }),
    );
    // A hold of 30 min in three goes is a hold of 30 min.
    close(addBakes([hold(60, 12), hold(60, 8), hold(60, 10)], at60), 30);
  });
});

describe('a bake trace judged against its data sheet', () => {
  const kinetics = cureKinetics([
    { celsius: 20, minutes: 180 },
    { celsius: 60, minutes: 30 },
  ]);

  it('is cured by a full hold, and exactly so', () => {
    const judged = judgeBake(kinetics, { trace: hold(60, 30) });
    expect(judged).toMatchObject({ cured: true, leftReferenceMinutes: 0, peakCelsius: 60, longestGapMinutes: 30 });
    expect(judged.findings).toEqual([]);
  });

  it('says what is left, and counts earlier bakes', () => {
    const short = judgeBake(kinetics, { trace: hold(60, 20) });
    expect(short.cured).toBe(false);
    expect(short.leftReferenceMinutes).toBeCloseTo(10, 9);
    expect(judgeBake(kinetics, { trace: hold(60, 20), earlierReferenceMinutes: 10 }).cured).toBe(true);
  });

  it('does not call a bake cured that only the air had heated', () => {
    const slowMetal = [row(0, 20), row(20, 50), row(30, 55)];
    expect(judgeBake(kinetics, { trace: slowMetal }).cured).toBe(false);
  });

  it('reports a peak above the sheet and above the part’s limit', () => {
    const judged = judgeBake(kinetics, { trace: [row(0, 20), row(10, 85), row(20, 60)], limitCelsius: 80 });
    expect(judged.findings).toEqual([
      { code: 'above-printed-temperatures', value: 85, limit: 60 },
      { code: 'above-heat-limit', value: 85, limit: 80 },
    ]);
  });

  it('has no peak where nothing was recorded', () => {
    expect(judgeBake(kinetics, { trace: [] })).toMatchObject({ cured: false, peakCelsius: null, longestGapMinutes: 0 });
  });
});
