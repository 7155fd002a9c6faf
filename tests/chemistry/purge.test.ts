import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { defaultAirFlow } from '#chemistry/purge/default-air-flow.ts';
import { peopleGate } from '#chemistry/purge/people-gate.ts';
import { purgeBeforeHeat } from '#chemistry/purge/purge-minutes.ts';
import { cubicMetresFromCubicFeet, cubicMetresPerHourFromCfm } from '#chemistry/units/air-flow.ts';
import { holds } from './holds.ts';

const purge = (cubicMetres: number, cubicMetresPerHour: number) => purgeBeforeHeat({ cubicMetres, cubicMetresPerHour });

describe('purge before heat: max(3 min, 4 V / Q) (International Fire Code 2018, ch. 24)', () => {
  it('is 3.000 min for 96 m3 at 20,000 m3/h', () => {
    expect(purge(96, 20_000)).toEqual({ heat: 'after-purge', minutes: 3, wholeSeconds: 180, wholeMinutes: 3 });
  });

  it('is 4.608 min for 96 m3 at 5,000 m3/h', () => {
    expect(purge(96, 5000)).toEqual({ heat: 'after-purge', minutes: 4.608, wholeSeconds: 277, wholeMinutes: 5 });
  });

  it('is 4.032 min for 3,024 ft3 at 3,000 cfm', () => {
    const inFeet = purge(cubicMetresFromCubicFeet(3024), cubicMetresPerHourFromCfm(3000));
    expect(inFeet).toMatchObject({ minutes: 4.032, wholeSeconds: 242 });
  });

  it('rounds to 1 ms before it rounds up: 100 m3 at 133.3333333 m3/min is 180 s, not 181', () => {
    expect(purge(100, 133.3333333 * 60)).toMatchObject({ wholeSeconds: 180, wholeMinutes: 3 });
  });

  it('refuses heat without a known flow or volume', () => {
    expect(purge(96, 0)).toEqual({ heat: 'refused', code: 'no-air-flow' });
    const unknown = { cubicMetres: 96, cubicMetresPerHour: null };
    expect(purgeBeforeHeat(unknown)).toEqual({ heat: 'refused', code: 'air-flow-unknown' });
    const unmeasured = { cubicMetres: null, cubicMetresPerHour: 20_000 };
    expect(purgeBeforeHeat(unmeasured)).toEqual({ heat: 'refused', code: 'volume-unknown' });
  });

  it('throws for what cannot be', () => {
    expect(() => purge(96, -1)).toThrow(/cubicMetresPerHour must be 0 or more/);
    expect(() => purge(96, NaN)).toThrow(/cubicMetresPerHour/);
    expect(() => purge(0, 5000)).toThrow(/cubicMetres must be more than 0/);
  });

  it('is never under three minutes nor under four changes of air', () => {
    const cubic = fc.double({ min: 1, max: 1000, noNaN: true });
    holds(
      fc.property(cubic, fc.double({ min: 10, max: 1e5, noNaN: true }), (volume, flow) => {
        const result = purge(volume, flow);
        if (result.heat === 'refused') throw new Error(result.code);
        expect(result.minutes).toBeGreaterThanOrEqual(3);
        // Half a millisecond is the most that rounding may take away.
        expect((result.minutes * flow) / 60).toBeGreaterThanOrEqual(4 * volume - flow / 60 / 100_000);
        expect(result.wholeMinutes).toBeGreaterThanOrEqual(result.minutes);
      }),
    );
  });
});

describe('air flow where none was measured', () => {
  it('is the cross-section times 100 ft/min (29 CFR 1910.107(b)(5)(i)): 10 m2 give 18,288 m3/h', () => {
    expect(defaultAirFlow(10)).toBeCloseTo(18_288, 9);
    expect(defaultAirFlow(10, 0.25)).toBe(9000);
  });
});

describe('when people may enter (HSE: booths 1 to 5 min, open workshop 30 min, or as measured)', () => {
  it('is the longer of purge and clearance', () => {
    expect(peopleGate('booth', purge(96, 5000), 4)).toEqual({ wholeMinutes: 5, setBy: 'purge' });
    expect(peopleGate('booth', purge(96, 20_000), 4.5)).toEqual({ wholeMinutes: 5, setBy: 'measured-clearance' });
    expect(peopleGate('booth', purge(96, 20_000), 2)).toEqual({ wholeMinutes: 3, setBy: 'purge' });
  });

  it('takes the longest of the range until it is measured', () => {
    expect(peopleGate('booth', purge(96, 20_000), null)).toEqual({ wholeMinutes: 5, setBy: 'unmeasured-clearance' });
    expect(peopleGate('open-workshop', purge(96, 20_000), null).wholeMinutes).toBe(30);
  });

  it('keeps people out even where heat is refused', () => {
    expect(peopleGate('booth', purge(96, 0), 2)).toEqual({ wholeMinutes: 2, setBy: 'measured-clearance' });
  });
});
