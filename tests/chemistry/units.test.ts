import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  minutesToMillisecond,
  wholeMilliseconds,
  wholeMinutesDown,
  wholeMinutesUp,
  wholeSecondsUp,
} from '#chemistry/rounding.ts';
import {
  cfmFromCubicMetresPerHour,
  cubicFeetFromCubicMetres,
  cubicMetresFromCubicFeet,
  cubicMetresPerHourFromCfm,
  metresPerSecondFromFeetPerMinute,
} from '#chemistry/units/air-flow.ts';
import {
  celsiusDifferenceFromFahrenheit,
  celsiusFromFahrenheit,
  celsiusFromKelvin,
  fahrenheitDifferenceFromCelsius,
  fahrenheitFromCelsius,
  kelvinFromCelsius,
  limitForDisplay,
} from '#chemistry/units/temperature.ts';
import { holds } from './holds.ts';

describe('temperatures', () => {
  // Fixed points of the scales.
  it.each([
    [0, 32],
    [100, 212],
    [-40, -40],
    [25, 77],
  ])('%d C is %d F', (celsius, fahrenheit) => {
    expect(fahrenheitFromCelsius(celsius)).toBeCloseTo(fahrenheit, 12);
    expect(celsiusFromFahrenheit(fahrenheit)).toBeCloseTo(celsius, 12);
  });

  it('keeps differences free of the 32: 5 F are 2.78 C, 3 C are 5.4 F', () => {
    expect(celsiusDifferenceFromFahrenheit(5)).toBeCloseTo(2.7778, 4);
    expect(fahrenheitDifferenceFromCelsius(3)).toBeCloseTo(5.4, 12);
  });

  it('never rounds 120 F up: 48.889 C, shown as 48.8 or 48', () => {
    const limit = celsiusFromFahrenheit(120);
    expect(limit).toBeCloseTo(48.889, 3);
    expect(limit).toBeLessThan(48.889);
    expect(limitForDisplay(limit)).toBe(48);
    expect(limitForDisplay(limit, 1)).toBe(48.8);
    expect(limitForDisplay(60)).toBe(60);
    expect(limitForDisplay(60.3, 1)).toBe(60.3);
  });

  it('goes there and back', () => {
    holds(
      fc.property(fc.double({ min: -200, max: 1500, noNaN: true }), (celsius) => {
        expect(celsiusFromFahrenheit(fahrenheitFromCelsius(celsius))).toBeCloseTo(celsius, 8);
        expect(celsiusFromKelvin(kelvinFromCelsius(celsius))).toBeCloseTo(celsius, 8);
      }),
    );
  });
});

describe('air flow', () => {
  it('turns 100 ft/min into 0.508 m/s (29 CFR 1910.107(b)(5)(i))', () => {
    expect(metresPerSecondFromFeetPerMinute(100)).toBeCloseTo(0.508, 12);
  });

  it('turns feet into metres by the international foot of 0.3048 m (1959)', () => {
    expect(cubicMetresFromCubicFeet(1)).toBeCloseTo(0.028316846592, 15);
    expect(cubicMetresPerHourFromCfm(3000)).toBeCloseTo(5097.032, 3);
    expect(cubicFeetFromCubicMetres(cubicMetresFromCubicFeet(3024))).toBeCloseTo(3024, 9);
    expect(cfmFromCubicMetresPerHour(cubicMetresPerHourFromCfm(3000))).toBeCloseTo(3000, 9);
  });
});

describe('rounding', () => {
  it('drops binary crumbs before it rounds up', () => {
    expect(wholeSecondsUp(180.000000045 / 60)).toBe(180);
    expect(wholeMinutesUp(3.00000000075)).toBe(3);
    expect(wholeMinutesUp(0.1 * 3 * 10)).toBe(3);
  });

  it('rounds a least time up and a most time down', () => {
    expect(wholeMinutesUp(4.001)).toBe(5);
    expect(wholeSecondsUp(1 + 1 / 60_000)).toBe(61);
    expect(wholeMinutesDown(4.999)).toBe(4);
    expect(wholeMinutesDown(2.9999999999)).toBe(3);
    expect(wholeMilliseconds(4.608)).toBe(276_480);
    expect(minutesToMillisecond(4.6080000001)).toBe(4.608);
  });
});
