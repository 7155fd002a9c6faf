import { describe, expect, it } from 'vitest';
import { airStanding } from '#chemistry/air/air-standing.ts';
import { suggestReducerSpeed } from '#chemistry/air/reducer-speed.ts';
import { dewPointMarginCelsius, gateAtDewPoint, sprayGate } from '#chemistry/air/spray-gate.ts';
import { celsiusDifferenceFromFahrenheit, celsiusFromFahrenheit } from '#chemistry/units/temperature.ts';

describe('spray gate: surface at least 3.0 C over the dew point (ISO 8502-4 practice)', () => {
  it('opens for dry bulb 21, wet bulb 17: dew point 15, surface 19', () => {
    const gate = gateAtDewPoint(15, 19);
    expect(gate).toEqual({ open: true, dewPointCelsius: 15, marginCelsius: 4, leastSurfaceCelsius: 18 });
  });

  it('stays shut for 16 C and 71 %: dew point 11, surface 13', () => {
    const gate = sprayGate({ airCelsius: 16, relativeHumidityPercent: 71 }, 13);
    expect(Math.round(gate.dewPointCelsius)).toBe(11);
    expect(gate.open).toBe(false);
  });

  it('is exact at the border, in Celsius and in Fahrenheit', () => {
    expect(gateAtDewPoint(11, 14).open).toBe(true);
    expect(gateAtDewPoint(11, 13.999).open).toBe(false);
    // 51.8 F and 57.2 F are 11 C and 14 C.
    expect(gateAtDewPoint(celsiusFromFahrenheit(51.8), celsiusFromFahrenheit(57.2)).open).toBe(true);
    // 5 F apart are 2.78 C: not enough in either unit.
    expect(gateAtDewPoint(celsiusFromFahrenheit(52), celsiusFromFahrenheit(57)).open).toBe(false);
  });

  it('lets a shop ask for more margin, never for less', () => {
    expect(gateAtDewPoint(11, 15, 5).open).toBe(false);
    expect(gateAtDewPoint(11, 16, 5).leastSurfaceCelsius).toBe(16);
    expect(() => gateAtDewPoint(11, 15, celsiusDifferenceFromFahrenheit(5))).toThrow(/at least 3/);
  });

  it('shows a wet surface as a negative margin', () => {
    expect(dewPointMarginCelsius(10, 12)).toBe(-2);
  });
});

describe('air to spray in (a waterborne maker’s sheet: 18 to 25 C, 40 to 70 %, never under 15 C)', () => {
  it.each([
    [18, 40, 'best', []],
    [25, 70, 'best', []],
    [15, 55, 'outside-best', ['cooler-than-best']],
    [14.9, 55, 'never', ['too-cold-to-spray']],
    [25.1, 39, 'outside-best', ['warmer-than-best', 'drier-than-best']],
    [20, 70.5, 'outside-best', ['damper-than-best']],
    [10, 90, 'never', ['too-cold-to-spray', 'damper-than-best']],
  ] as const)('%d C and %d %%: %s', (airCelsius, relativeHumidityPercent, standing, codes) => {
    const result = airStanding({ airCelsius, relativeHumidityPercent });
    expect(result.standing).toBe(standing);
    expect(result.findings.map((finding) => finding.code)).toEqual(codes);
  });

  it('names the figure and the limit', () => {
    const { findings } = airStanding({ airCelsius: 12, relativeHumidityPercent: 50 });
    expect(findings).toEqual([{ code: 'too-cold-to-spray', value: 12, limit: 15 }]);
  });

  it('follows the shop’s own ranges', () => {
    const ranges = { bestCelsius: [20, 22], bestHumidityPercent: [45, 55], neverBelowCelsius: 18 } as const;
    expect(airStanding({ airCelsius: 17, relativeHumidityPercent: 50 }, ranges).standing).toBe('never');
    expect(airStanding({ airCelsius: 23, relativeHumidityPercent: 50 }, ranges).standing).toBe('outside-best');
  });
});

describe('reducer speed (makers’ grids, from memory)', () => {
  it.each([
    [17.9, 'fast'],
    [18, 'standard'],
    [25, 'standard'],
    [25.1, 'slow'],
    [32, 'slow'],
    [32.1, 'very-slow'],
  ] as const)('at %d C: %s', (airCelsius, speed) => {
    expect(suggestReducerSpeed(airCelsius)).toBe(speed);
  });
});
