import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { timeRatio } from '#chemistry/cure/arrhenius.ts';
import { flashMinutes } from '#chemistry/flash/flash-minutes.ts';
import { holds } from './holds.ts';

const dryAir = { relativeHumidityPercent: 50 };
const sheet = [
  { celsius: 15, minutes: 25 },
  { celsius: 20, minutes: 15 },
  { celsius: 30, minutes: 8 },
];
const codes = (of: { findings: readonly { code: string }[] }) => of.findings.map((finding) => finding.code);

describe('flash by the data sheet’s own points', () => {
  it.each(sheet)('gives back the printed $minutes min at $celsius C', ({ celsius, minutes }) => {
    const flash = flashMinutes({ printed: sheet, airCelsius: celsius, ...dryAir });
    expect(flash.minutes).toBeCloseTo(minutes, 9);
    expect(flash.wholeMinutes).toBe(minutes);
    expect(codes(flash)).toEqual([]);
  });

  it('runs by Arrhenius between two neighbours: straight in ln(minutes) over 1/T', () => {
    const kelvin = (celsius: number) => celsius + 273.15;
    const share = (1 / kelvin(25) - 1 / kelvin(20)) / (1 / kelvin(30) - 1 / kelvin(20));
    const expected = Math.exp(Math.log(15) + share * (Math.log(8) - Math.log(15)));
    expect(flashMinutes({ printed: sheet, airCelsius: 25, ...dryAir }).minutes).toBeCloseTo(expected, 9);
  });

  it('takes the points in any order', () => {
    const question = { airCelsius: 17, ...dryAir };
    const turned = flashMinutes({ printed: sheet.toReversed(), ...question });
    expect(turned).toEqual(flashMinutes({ printed: sheet, ...question }));
  });

  it('gets longer below the coldest point and no shorter above the hottest, and says so', () => {
    const cold = flashMinutes({ printed: sheet, airCelsius: 12, ...dryAir });
    expect(cold.minutes).toBeGreaterThan(25);
    expect(codes(cold)).toEqual(['below-printed-temperatures']);
    const hot = flashMinutes({ printed: sheet, airCelsius: 38, ...dryAir });
    expect(hot.minutes).toBe(8);
    expect(codes(hot)).toEqual(['above-printed-temperatures']);
  });
});

describe('flash by the default scaling', () => {
  const printed = [{ celsius: 20, minutes: 10 }];

  it('follows 50 kJ/mol from a single point (from memory) and says so', () => {
    const cool = flashMinutes({ printed, airCelsius: 15, ...dryAir });
    expect(cool.minutes).toBeCloseTo(10 * timeRatio(15, 20, 50), 9);
    expect(codes(cool)).toEqual(['temperature-scaling-assumed', 'below-printed-temperatures']);
  });

  it('is 10 min at 20 C for 10 min at 20 C, without a warning', () => {
    const same = flashMinutes({ printed, airCelsius: 20, ...dryAir });
    expect(same).toEqual({ minutes: 10, wholeMinutes: 10, humidityFactor: 1, findings: [] });
  });

  it('rounds the least minutes up', () => {
    // 10 min at 20 C is 7.06 min at 25 C with 50 kJ/mol.
    const warm = flashMinutes({ printed, airCelsius: 25, ...dryAir });
    expect(warm.minutes).toBeCloseTo(7.06, 1);
    expect(warm.wholeMinutes).toBe(8);
  });
});

describe('humidity', () => {
  const printed = [{ celsius: 20, minutes: 10 }];
  const humiditySteps = [
    { abovePercent: 85, factor: 1.5 },
    { abovePercent: 70, factor: 1.25 },
  ];
  const at = (relativeHumidityPercent: number) =>
    flashMinutes({ printed, airCelsius: 20, relativeHumidityPercent, humiditySteps });

  it('changes nothing unless the shop has set a factor', () => {
    expect(flashMinutes({ printed, airCelsius: 20, relativeHumidityPercent: 95 }).minutes).toBe(10);
  });

  it('stretches by the shop’s step and warns that it did', () => {
    expect(at(70).minutes).toBe(10);
    expect(at(71)).toMatchObject({ minutes: 12.5, wholeMinutes: 13, humidityFactor: 1.25 });
    expect(at(90).minutes).toBe(15);
    expect(at(90).findings).toEqual([{ code: 'humidity-factor-applied', value: 90, limit: 85 }]);
  });

  it('never shortens a flash', () => {
    const humidity = [{ abovePercent: 10, factor: 0.9 }];
    const ask = () => flashMinutes({ printed, airCelsius: 20, relativeHumidityPercent: 50, humiditySteps: humidity });
    expect(ask).toThrow(/humidity factor must be 1 or more/);
  });
});

it('is never slower when hotter, for any sheet whose points are in order', () => {
  const points = fc.uniqueArray(fc.integer({ min: 5, max: 40 }), { minLength: 1, maxLength: 5 }).chain((temperatures) =>
    fc
      .array(fc.integer({ min: 1, max: 60 }), { minLength: temperatures.length, maxLength: temperatures.length })
      .map((minutes) => {
        const falling = minutes.toSorted((a, b) => b - a);
        return temperatures
          .toSorted((a, b) => a - b)
          .map((celsius, index) => ({ celsius, minutes: falling[index] ?? 1 }));
      }),
  );
  const air = fc.double({ min: 0, max: 45, noNaN: true });
  holds(
    fc.property(points, air, air, (printed, one, other) => {
      // A sheet so steep that no chemistry explains it is refused, as its own test shows.
      fc.pre(printed.every((point, i) => i === 0 || point.minutes * 4 >= (printed[i - 1]?.minutes ?? 0)));
      const minutes = (airCelsius: number) => flashMinutes({ printed, airCelsius, ...dryAir }).minutes;
      const [colder, hotter] = one < other ? [one, other] : [other, one];
      expect(minutes(hotter)).toBeLessThanOrEqual(minutes(colder) * (1 + 1e-12));
    }),
  );
});

it('refuses a sheet so steep that no chemistry explains it', () => {
  const printed = [
    { celsius: 20, minutes: 60 },
    { celsius: 20.1, minutes: 5 },
  ];
  expect(() => flashMinutes({ printed, airCelsius: 20.05, ...dryAir })).toThrow(/kilojoulesPerMole/);
});
