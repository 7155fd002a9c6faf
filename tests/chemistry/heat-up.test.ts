import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { equivalentMinutes } from '#chemistry/cure/equivalent-minutes.ts';
import { balanceCelsius } from '#chemistry/infrared/balance-temperature.ts';
import { energyBalance, type Balance, type LampSetup } from '#chemistry/infrared/energy-balance.ts';
import { heatUp } from '#chemistry/infrared/heat-up.ts';
import { heatCapacityPerSquareMetre } from '#chemistry/infrared/panel-materials.ts';
import { holds } from './holds.ts';

const setup: LampSetup = {
  lamp: { kilowatts: 6, widthMetres: 1, heightMetres: 0.5 },
  panel: { joulesPerSquareMetreKelvin: heatCapacityPerSquareMetre('steel', 0.8) },
  surroundings: { airCelsius: 20 },
  distanceMetres: 0.7,
};
const NO_LIMIT = 1000;

/** Minutes to a temperature by the separated integral `C dT / (absorbed - lost)`, Simpson: not the product's way. */
function minutesTo(celsius: number, balance: Balance, fromCelsius: number, power = 1): number {
  const pace = (kelvin: number) => {
    const radiated = balance.emissivity * 5.670374419e-8 * (kelvin ** 4 - balance.roomKelvin ** 4);
    return (
      balance.joulesPerKelvin /
      (balance.absorbedWatts * power - radiated - balance.convection * (kelvin - balance.roomKelvin))
    );
  };
  const [from, pieces] = [fromCelsius + 273.15, 2000];
  const width = (celsius - fromCelsius) / pieces;
  let sum = pace(from) + pace(from + width * pieces);
  for (let piece = 1; piece < pieces; piece += 1) sum += (piece % 2 === 1 ? 4 : 2) * pace(from + piece * width);
  return (sum * width) / 3 / 60;
}

const last = (question: Parameters<typeof heatUp>[0]) => heatUp(question).trace.at(-1)?.metalCelsius ?? NaN;

describe('a panel under a lamp', () => {
  it('comes within 1e-4 C of the separated integral', () => {
    const balance = energyBalance(setup);
    for (const celsius of [25, 40, 60, 80, 110]) {
      const minutes = minutesTo(celsius, balance, 20);
      expect(Math.abs(last({ ...setup, minutes, limitCelsius: NO_LIMIT }) - celsius)).toBeLessThan(1e-4);
    }
  });

  it('does not care into how many runs it is cut', () => {
    const whole = last({ ...setup, minutes: 6, limitCelsius: NO_LIMIT });
    let celsius = 20;
    for (let run = 0; run < 60; run += 1) {
      celsius = last({ ...setup, minutes: 0.1, limitCelsius: NO_LIMIT, startCelsius: celsius });
    }
    expect(Math.abs(celsius - whole)).toBeLessThan(1e-4);
  });

  it('ends at the balance after a long time, in few rows', () => {
    const long = heatUp({ ...setup, minutes: 100 * 60, limitCelsius: NO_LIMIT });
    expect(long.trace.at(-1)?.minutes).toBe(6000);
    expect(long.trace.at(-1)?.metalCelsius).toBeCloseTo(balanceCelsius(setup), 5);
    expect(long.trace.length).toBeLessThan(5000);
  });

  it('stays at the room’s temperature without a lamp, and cools to it from above', () => {
    const dark = { ...setup, lamp: { ...setup.lamp, kilowatts: 0 }, limitCelsius: 80 };
    expect(last({ ...dark, minutes: 30 })).toBe(20);
    const cooling = heatUp({ ...dark, minutes: 600, startCelsius: 60 });
    expect(cooling.trace.at(-1)?.metalCelsius).toBeCloseTo(20, 4);
    const falls = cooling.trace.every((row, i, rows) => row.metalCelsius <= (rows[i - 1]?.metalCelsius ?? 60));
    expect(falls).toBe(true);
  });

  it('barely warms from far away', () => {
    expect(last({ ...setup, distanceMetres: 100, minutes: 60, limitCelsius: 80 })).toBeLessThan(20.1);
  });

  it('starts at half power where asked', () => {
    const gentle = heatUp({ ...setup, minutes: 5, halfPowerMinutes: 3, limitCelsius: NO_LIMIT });
    const change = gentle.trace.find((row) => row.minutes === 3);
    expect(change).toBeDefined();
    expect(minutesTo(change?.metalCelsius ?? NaN, energyBalance(setup), 20, 0.5)).toBeCloseTo(3, 5);
    expect(gentle.trace.at(-1)?.metalCelsius).toBeLessThan(last({ ...setup, minutes: 5, limitCelsius: NO_LIMIT }));
    const short = { ...setup, minutes: 2, limitCelsius: NO_LIMIT };
    expect(last({ ...short, halfPowerMinutes: 60 })).toBe(last({ ...short, halfPowerMinutes: 2 }));
  });
});

describe('the part’s limit', () => {
  it('ends the reckoning, and says when it was reached', () => {
    const { outcome, trace } = heatUp({ ...setup, minutes: 60, limitCelsius: 80 });
    expect(outcome.code).toBe('limit-reached');
    if (outcome.code !== 'limit-reached') return;
    expect(outcome.atMinute).toBeCloseTo(minutesTo(80, energyBalance(setup), 20), 5);
    expect(trace.at(-1)?.metalCelsius).toBeCloseTo(80, 9);
    expect(trace.at(-1)?.minutes).toBe(outcome.atMinute);
  });

  it('is never passed, whatever the lamp', () => {
    const kilowatts = fc.double({ min: 0, max: 40, noNaN: true });
    const distance = fc.double({ min: 0.1, max: 3, noNaN: true });
    const limit = fc.double({ min: 21, max: 150, noNaN: true });
    holds(
      fc.property(kilowatts, distance, limit, (power, distanceMetres, limitCelsius) => {
        const lamp = { ...setup.lamp, kilowatts: power };
        const { trace, outcome } = heatUp({ ...setup, lamp, distanceMetres, minutes: 20, limitCelsius });
        expect(Math.max(...trace.map((row) => row.metalCelsius))).toBeLessThanOrEqual(limitCelsius + 1e-9);
        expect(trace.at(-1)?.minutes === 20 || outcome.code === 'limit-reached').toBe(true);
      }),
    );
  });

  it('must lie above the start', () => {
    expect(() => heatUp({ ...setup, minutes: 1, limitCelsius: 20 })).toThrow(/startCelsius must be below the limit/);
  });
});

it('gives a trace whose cure can be counted', () => {
  const { trace } = heatUp({ ...setup, lamp: { ...setup.lamp, kilowatts: 2 }, minutes: 30, limitCelsius: 80 });
  const cure = equivalentMinutes(trace, { referenceCelsius: 60, kilojoulesPerMole: 50 });
  expect(cure).toBeGreaterThan(0);
  expect(cure).toBeLessThan(60);
});
