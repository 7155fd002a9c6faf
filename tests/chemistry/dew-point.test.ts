import psychrolib from 'psychrolib';
import { describe, expect, it } from 'vitest';
import { dewPointCelsius, dewPointFromWetBulbCelsius } from '#chemistry/air/dew-point.ts';
import { relativeHumidityPercentAt } from '#chemistry/air/relative-humidity-at.ts';
import { saturationPressurePascals } from '#chemistry/air/saturation-pressure.ts';

psychrolib.SetUnitSystem(psychrolib.SI);

describe('dew point', () => {
  // psychrolib 1.1.1, ASHRAE Handbook Fundamentals 2017.
  it.each([
    [25, 80, 21.309],
    [20, 50, 9.272],
    [20, 60, 12.007],
    [25, 60, 16.701],
    [30, 70, 23.928],
    [40, 25, 16.234],
  ])('at %d C and %d %% is %d C', (airCelsius, relativeHumidityPercent, expected) => {
    expect(psychrolib.GetTDewPointFromRelHum(airCelsius, relativeHumidityPercent / 100)).toBeCloseTo(expected, 3);
    expect(Math.abs(dewPointCelsius({ airCelsius, relativeHumidityPercent }) - expected)).toBeLessThan(0.15);
  });

  it('stays within 0.15 C of ASHRAE 2017 over 0 to 60 C and 20 to 100 %, dew points from 0 C up', () => {
    let worst = 0;
    let compared = 0;
    for (let airCelsius = 0; airCelsius <= 60; airCelsius += 1) {
      for (let percent = 20; percent <= 100; percent += 1) {
        const reference = psychrolib.GetTDewPointFromRelHum(airCelsius, percent / 100);
        if (reference < 0) continue;
        compared += 1;
        const ours = dewPointCelsius({ airCelsius, relativeHumidityPercent: percent });
        worst = Math.max(worst, Math.abs(ours - reference));
      }
    }
    expect(compared).toBeGreaterThan(3500);
    expect(worst).toBeLessThan(0.15);
  });

  it('is the air temperature itself at 100 %', () => {
    for (const airCelsius of [-5, 0, 18, 60]) {
      expect(dewPointCelsius({ airCelsius, relativeHumidityPercent: 100 })).toBeCloseTo(airCelsius, 9);
    }
  });

  it('takes the saturation pressure at 0 C from Alduchov & Eskridge 1996', () => {
    expect(saturationPressurePascals(0)).toBe(610.94);
  });
});

describe('dew point from a wet bulb', () => {
  it('gives a table’s whole degree for 21 C dry and 17 C wet: 15 C (ISO 8502-4 practice)', () => {
    expect(Math.round(dewPointFromWetBulbCelsius({ airCelsius: 21, wetBulbCelsius: 17 }))).toBe(15);
  });

  it('stays within 0.2 C of ASHRAE 2017 in a shop’s air', () => {
    for (let airCelsius = 10; airCelsius <= 35; airCelsius += 1) {
      for (let depression = 0; depression <= 6; depression += 1) {
        const wetBulbCelsius = airCelsius - depression;
        const reference = psychrolib.GetTDewPointFromTWetBulb(airCelsius, wetBulbCelsius, 101_325);
        if (reference < 0) continue;
        const ours = dewPointFromWetBulbCelsius({ airCelsius, wetBulbCelsius });
        expect(Math.abs(ours - reference), `${airCelsius}/${wetBulbCelsius}`).toBeLessThan(0.2);
      }
    }
  });

  it('refuses a wet bulb warmer than the air, or one that leaves no vapour', () => {
    expect(() => dewPointFromWetBulbCelsius({ airCelsius: 20, wetBulbCelsius: 20.1 })).toThrow(/wetBulbCelsius/);
    expect(() => dewPointFromWetBulbCelsius({ airCelsius: 40, wetBulbCelsius: 5 })).toThrow(/nearer to the air/);
  });
});

describe('relative humidity after heating', () => {
  const room = { airCelsius: 20, relativeHumidityPercent: 50 };

  it('falls from 50 % at 20 C to 5.86 % at 60 C (psychrolib, ASHRAE 2017)', () => {
    const dew = psychrolib.GetTDewPointFromRelHum(20, 0.5);
    expect(100 * psychrolib.GetRelHumFromTDewPoint(60, dew)).toBeCloseTo(5.86, 2);
    expect(relativeHumidityPercentAt(room, 60)).toBeCloseTo(5.86, 1);
  });

  it('leaves the dew point where it was', () => {
    for (const airCelsius of [15, 25, 60, 93]) {
      const heated = { airCelsius, relativeHumidityPercent: relativeHumidityPercentAt(room, airCelsius) };
      expect(dewPointCelsius(heated)).toBeCloseTo(dewPointCelsius(room), 9);
    }
  });

  it('stays at 100 % below the dew point', () => {
    expect(relativeHumidityPercentAt(room, 5)).toBe(100);
  });
});
