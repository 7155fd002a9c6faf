import { describe, expect, it } from 'vitest';
import { rateRatio, timeRatio } from '#chemistry/cure/arrhenius.ts';
import { bakeMinutesOnTheClock } from '#chemistry/cure/bake-minutes.ts';
import { cureMinutesAt, minutesStillToCure } from '#chemistry/cure/cure-minutes-at.ts';
import { fitActivationEnergy } from '#chemistry/cure/fit-activation-energy.ts';
import { cureKinetics } from '#chemistry/cure/kinetics.ts';

const codes = (of: { findings: readonly { code: string }[] }) => of.findings.map((finding) => finding.code);

describe('time ratio (Arrhenius; R = 8.314462618 J/(mol K), CODATA 2018)', () => {
  it('is 11.740 from 60 C to 20 C and 1.9674 from 30 C to 20 C at 50 kJ/mol (reckoned apart from this code)', () => {
    expect(timeRatio(20, 60, 50)).toBeCloseTo(11.74, 3);
    expect(timeRatio(20, 30, 50)).toBeCloseTo(1.9674, 4);
  });

  it('doubles the rate from 298 to 308 K at 52.9 kJ/mol (textbook: 52,893.5 J/mol with R = 8.314)', () => {
    const textbook = (52.8935 * 8.314462618) / 8.314;
    expect(rateRatio(308 - 273.15, 298 - 273.15, textbook)).toBeCloseTo(2, 4);
    expect(rateRatio(308 - 273.15, 298 - 273.15, 52.9)).toBeCloseTo(2, 3);
  });
});

describe('activation energy from two points', () => {
  it('is 26.95 kJ/mol for "2 days at 60 C or 7 days at 22 C" (a coatings engineer’s article)', () => {
    const days = (count: number) => count * 24 * 60;
    const bake = { celsius: 60, minutes: days(2) };
    const air = { celsius: 22, minutes: days(7) };
    expect(fitActivationEnergy(bake, air)).toBeCloseTo(26.95, 2);
    expect(fitActivationEnergy(air, bake)).toBe(fitActivationEnergy(bake, air));
  });

  it('is 52.85 kJ/mol where the rate rises fourfold from 293 to 313 K (textbook)', () => {
    const slow = { celsius: 293 - 273.15, minutes: 40 };
    const fast = { celsius: 313 - 273.15, minutes: 10 };
    // 52,854 with R = 8.314462618; the printed figure is cut after two places.
    expect(Math.abs(fitActivationEnergy(slow, fast) - 52.85)).toBeLessThan(0.01);
  });

  it('refuses points that do not get faster when hotter', () => {
    const at = (celsius: number, minutes: number) => ({ celsius, minutes });
    expect(() => fitActivationEnergy(at(20, 30), at(60, 30))).toThrow(/faster when hotter/);
    expect(() => fitActivationEnergy(at(20, 30), at(60, 31))).toThrow(/no slower when hotter/);
    expect(() => fitActivationEnergy(at(20, 30), at(20, 60))).toThrow(/different temperatures/);
  });
});

describe('kinetics of a data sheet', () => {
  it('fits two points and gives both back', () => {
    const kinetics = cureKinetics([
      { celsius: 20, minutes: 180 },
      { celsius: 60, minutes: 30 },
    ]);
    expect(codes(kinetics)).toEqual([]);
    expect(cureMinutesAt(kinetics, 60).minutes).toBeCloseTo(30, 9);
    expect(cureMinutesAt(kinetics, 20).minutes).toBeCloseTo(180, 9);
    // Sheets imply 23 to 47 kJ/mol.
    expect(kinetics.kilojoulesPerMole).toBeGreaterThan(23);
    expect(kinetics.kilojoulesPerMole).toBeLessThan(47);
  });

  it('takes 50 kJ/mol for a single point, and says so', () => {
    const kinetics = cureKinetics([{ celsius: 60, minutes: 30 }]);
    expect(kinetics.kilojoulesPerMole).toBe(50);
    expect(codes(kinetics)).toEqual(['activation-energy-assumed']);
    // 30 min at 60 C = 52.4 min at 50 C (reckoned apart from this code).
    const cooler = cureMinutesAt(kinetics, 50);
    expect(cooler.minutes).toBeCloseTo(52.4, 1);
    expect(cooler.wholeMinutes).toBe(53);
    expect(codes(cooler)).toEqual(['activation-energy-assumed', 'below-printed-temperatures']);
  });

  it('warns outside 20 to 90 kJ/mol', () => {
    const from = (cold: number, hot: number) =>
      codes(
        cureKinetics([
          { celsius: 20, minutes: cold },
          { celsius: 60, minutes: hot },
        ]),
      );
    expect(from(60, 30)).toEqual(['activation-energy-unusually-low']);
    expect(from(6000, 20)).toEqual(['activation-energy-unusually-high']);
  });

  it('warns outside the two printed temperatures, not at them', () => {
    const kinetics = cureKinetics([
      { celsius: 60, minutes: 30 },
      { celsius: 20, minutes: 180 },
    ]);
    expect(codes(cureMinutesAt(kinetics, 20))).toEqual([]);
    expect(codes(cureMinutesAt(kinetics, 60))).toEqual([]);
    expect(cureMinutesAt(kinetics, 19).findings).toEqual([
      { code: 'below-printed-temperatures', value: 19, limit: 20 },
    ]);
    expect(codes(cureMinutesAt(kinetics, 61))).toEqual(['above-printed-temperatures']);
  });
});

describe('time still to bake', () => {
  const kinetics = cureKinetics([{ celsius: 60, minutes: 30 }]);

  it('is what is left, at the temperature that is left to bake with', () => {
    expect(minutesStillToCure(kinetics, 20, 60).minutes).toBeCloseTo(10, 9);
    expect(minutesStillToCure(kinetics, 20, 50).minutes).toBeCloseTo(10 * timeRatio(50, 60, 50), 9);
  });

  it('is never negative', () => {
    expect(minutesStillToCure(kinetics, 31, 50).wholeMinutes).toBe(0);
  });
});

describe('bake minutes on the clock', () => {
  it('add the heat-up to a metal time only', () => {
    expect(bakeMinutesOnTheClock({ minutes: 30, reference: 'metal', heatUpMinutes: 12 })).toBe(42);
    expect(bakeMinutesOnTheClock({ minutes: 30, reference: 'air', heatUpMinutes: 12 })).toBe(30);
    expect(bakeMinutesOnTheClock({ minutes: 30.2, reference: 'metal', heatUpMinutes: 0 })).toBe(31);
  });
});
