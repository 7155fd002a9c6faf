import { describe, expect, it } from 'vitest';
import { airStanding } from '#chemistry/air/air-standing.ts';
import { dewPointCelsius } from '#chemistry/air/dew-point.ts';
import { suggestReducerSpeed } from '#chemistry/air/reducer-speed.ts';
import { sprayGate } from '#chemistry/air/spray-gate.ts';
import { timeRatio } from '#chemistry/cure/arrhenius.ts';
import { bakeMinutesOnTheClock } from '#chemistry/cure/bake-minutes.ts';
import { minutesStillToCure } from '#chemistry/cure/cure-minutes-at.ts';
import { cureKinetics } from '#chemistry/cure/kinetics.ts';
import { amperesFromKilowatts } from '#chemistry/electrical/amperes.ts';
import { lampsTogether } from '#chemistry/electrical/lamps-together.ts';
import { flashMinutes } from '#chemistry/flash/flash-minutes.ts';
import { heatUp } from '#chemistry/infrared/heat-up.ts';
import { heatCapacityPerSquareMetre } from '#chemistry/infrared/panel-materials.ts';
import { viewFactor } from '#chemistry/infrared/view-factor.ts';
import { bakeRefusals } from '#chemistry/limits/bake-allowed.ts';
import { strictestLimit } from '#chemistry/limits/strictest-limit.ts';
import { defaultAirFlow } from '#chemistry/purge/default-air-flow.ts';
import { QuantityError } from '#chemistry/quantity.ts';
import { celsiusFromFahrenheit, kelvinFromCelsius } from '#chemistry/units/temperature.ts';
import { windowAfterCoat } from '#chemistry/windows/coat-window.ts';
import { potLifeVerdict } from '#chemistry/windows/pot-life.ts';

const sheet = [{ celsius: 60, minutes: 30 }];
const lamp = { kilowatts: 6, widthMetres: 1, heightMetres: 0.5 };
const setup = {
  lamp,
  panel: { joulesPerSquareMetreKelvin: 3132 },
  surroundings: { airCelsius: 20 },
  distanceMetres: 0.7,
};
const air = { airCelsius: 20, relativeHumidityPercent: 50 };
const noLimit = { celsius: null, minutes: null, needsSupport: false };

const cases: [name: string, quantity: RegExp, ask: () => unknown][] = [
  ['humidity of 0', /relativeHumidityPercent/, () => dewPointCelsius({ ...air, relativeHumidityPercent: 0 })],
  ['humidity over 100', /relativeHumidityPercent/, () => dewPointCelsius({ ...air, relativeHumidityPercent: 101 })],
  ['humidity under 0', /relativeHumidityPercent/, () => airStanding({ ...air, relativeHumidityPercent: -1 })],
  ['air that is NaN', /airCelsius/, () => dewPointCelsius({ ...air, airCelsius: NaN })],
  ['air below absolute zero', /airCelsius/, () => suggestReducerSpeed(-274)],
  ['surface that is NaN', /surfaceCelsius/, () => sprayGate(air, NaN)],
  ['margin under 3 C', /leastMarginCelsius/, () => sprayGate(air, 20, 2)],
  ['absolute zero', /celsius/, () => kelvinFromCelsius(-273.15)],
  ['Fahrenheit below absolute zero', /celsius/, () => celsiusFromFahrenheit(-500)],
  ['energy of 0', /kilojoulesPerMole/, () => timeRatio(20, 60, 0)],
  ['energy in joules', /kilojoulesPerMole/, () => timeRatio(20, 60, 50_000)],
  ['sheet without points', /printed points/, () => cureKinetics([])],
  ['printed time of 0', /minutes of a printed point/, () => cureKinetics([{ celsius: 60, minutes: 0 }])],
  ['printed temperature NaN', /celsius of a printed point/, () => cureKinetics([{ celsius: NaN, minutes: 9 }])],
  ['negative cure', /doneReferenceMinutes/, () => minutesStillToCure(cureKinetics(sheet), -1, 60)],
  [
    'negative heat-up',
    /heatUpMinutes/,
    () => bakeMinutesOnTheClock({ minutes: 30, reference: 'air', heatUpMinutes: -1 }),
  ],
  ['flash in impossible air', /airCelsius/, () => flashMinutes({ printed: sheet, ...air, airCelsius: -300 })],
  ['distance of 0', /distanceMetres/, () => viewFactor({ widthMetres: 1, heightMetres: 1, distanceMetres: 0 })],
  [
    'lamp of negative power',
    /kilowatts/,
    () => heatUp({ ...setup, lamp: { ...lamp, kilowatts: -1 }, minutes: 1, limitCelsius: 80 }),
  ],
  ['lamp for infinite time', /minutes/, () => heatUp({ ...setup, minutes: Infinity, limitCelsius: 80 })],
  ['panel of no thickness', /millimetres/, () => heatCapacityPerSquareMetre('steel', 0)],
  ['supply of 0 V', /volts/, () => amperesFromKilowatts(3, { volts: 0, phases: 1 })],
  [
    'lamp of 0 kW on a circuit',
    /lamp kilowatts/,
    () => lampsTogether([0], { volts: 230, phases: 1, breakerAmperes: 16 }, 'full'),
  ],
  ['breaker of 0 A', /breakerAmperes/, () => lampsTogether([3], { volts: 230, phases: 1, breakerAmperes: 0 }, 'full')],
  ['booth of no width', /crossSectionSquareMetres/, () => defaultAirFlow(0)],
  ['negative wait', /minimumMinutes/, () => windowAfterCoat(0, { minimumMinutes: -1, maximumMinutes: null })],
  ['coat ended never', /coatEndedMs/, () => windowAfterCoat(NaN, { minimumMinutes: 1, maximumMinutes: null })],
  ['pot life of 0', /potLifeMinutes/, () => potLifeVerdict({ mixedMs: 0, potLifeMinutes: 0 }, 0)],
  ['bake of no time', /minutes/, () => bakeRefusals(noLimit, { celsius: 60, minutes: 0, earlierHeatMinutes: 0 })],
  [
    'recorded limit that is NaN',
    /battery-recorded/,
    () =>
      strictestLimit({
        substrates: [],
        vehicle: { battery: true, batteryOut: false, recorded: { celsius: NaN, minutes: 45 } },
        booth: null,
        coatingCelsius: null,
      }),
  ],
];

describe('bad numbers throw a QuantityError that names the quantity', () => {
  it.each(cases)('%s', (_name, quantity, ask) => {
    let thrown: unknown;
    try {
      ask();
    } catch (error) {
      thrown = error;
    }
    expect(thrown).toBeInstanceOf(QuantityError);
    expect(thrown).toBeInstanceOf(RangeError);
    expect((thrown as QuantityError).quantity).toMatch(quantity);
  });

  it('says what was given and what it would have to be', () => {
    const error = new QuantityError('kilowatts', -1, '0 or more');
    expect(error.message).toBe('kilowatts must be 0 or more, not -1');
    expect(error).toMatchObject({ name: 'QuantityError', quantity: 'kilowatts', given: -1, need: '0 or more' });
  });
});
