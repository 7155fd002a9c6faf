import { describe, expect, it } from 'vitest';
import { bakeRefusals } from '#chemistry/limits/bake-allowed.ts';
import { BOOTH_AIR_LIMITS_CELSIUS, SUBSTRATE_LIMITS } from '#chemistry/limits/heat-sources.ts';
import { strictestLimit, type HeatQuestion, type VehicleHeat } from '#chemistry/limits/strictest-limit.ts';
import { celsiusFromFahrenheit } from '#chemistry/units/temperature.ts';

const engine: VehicleHeat = { battery: false };
const battery = (recorded: { celsius: number; minutes: number | null } | null, batteryOut = false): VehicleHeat => ({
  battery: true,
  batteryOut,
  recorded,
});
const question: HeatQuestion = { substrates: ['steel'], vehicle: engine, booth: 'us', coatingCelsius: null };

describe('published limits', () => {
  it('are 93 C in a US booth (IFC 2018, ch. 24: 200 F) and 100 C in an EU one (EN 16985:2018)', () => {
    expect(BOOTH_AIR_LIMITS_CELSIUS).toEqual({ us: 93, eu: 100 });
    expect(BOOTH_AIR_LIMITS_CELSIUS.us).toBeLessThanOrEqual(celsiusFromFahrenheit(200));
  });

  it('are 80 C, supported, for PP and TPO covers (a vehicle maker’s specification)', () => {
    expect(SUBSTRATE_LIMITS['pp-tpo']).toEqual({ celsius: 80, needsSupport: true, mark: 'published' });
  });

  it('keep ABS under its softening, 68 to 100 C (published)', () => {
    expect(SUBSTRATE_LIMITS.abs.celsius).toBeLessThan(68);
  });
});

describe('the strictest limit, and whose it is', () => {
  it('is the part’s in a booth', () => {
    expect(strictestLimit(question)).toEqual({
      celsius: { limit: 80, setBy: 'substrate-steel' },
      minutes: null,
      needsSupport: false,
    });
  });

  it('is the weakest part’s in a mixed load, whatever the order', () => {
    for (const substrates of [
      ['steel', 'abs', 'pp-tpo'],
      ['pp-tpo', 'abs', 'steel'],
    ] as const) {
      const limit = strictestLimit({ ...question, substrates });
      expect(limit.celsius).toEqual({ limit: 60, setBy: 'substrate-abs' });
      expect(limit.needsSupport).toBe(true);
    }
  });

  it('is the booth’s where the shop raised the part’s', () => {
    const raised = { ...question, substrateCelsius: { steel: 140 } };
    expect(strictestLimit(raised).celsius).toEqual({ limit: 93, setBy: 'booth-us' });
    expect(strictestLimit({ ...raised, booth: 'eu' }).celsius).toEqual({ limit: 100, setBy: 'booth-eu' });
  });

  it('is the coating’s where its sheet asks for less', () => {
    expect(strictestLimit({ ...question, coatingCelsius: 70 }).celsius).toEqual({ limit: 70, setBy: 'coating' });
  });

  it('is named after the vehicle, then the part, where limits are equal', () => {
    const equal = { ...question, vehicle: battery({ celsius: 80, minutes: null }), coatingCelsius: 80 };
    expect(strictestLimit(equal).celsius?.setBy).toBe('battery-recorded');
    expect(strictestLimit({ ...equal, vehicle: engine }).celsius?.setBy).toBe('substrate-steel');
  });

  it('is null where nothing limits', () => {
    const bare: HeatQuestion = { substrates: [], vehicle: engine, booth: null, coatingCelsius: null };
    expect(strictestLimit(bare)).toEqual({ celsius: null, minutes: null, needsSupport: false });
  });
});

describe('vehicles with a high-voltage battery', () => {
  it('get 49 C and 45 min where nothing is recorded', () => {
    const limit = strictestLimit({ ...question, vehicle: battery(null) });
    expect(limit.celsius).toEqual({ limit: 49, setBy: 'battery-unrecorded' });
    expect(limit.minutes).toEqual({ limit: 45, setBy: 'battery-unrecorded' });
  });

  it('get what is recorded: 60 C and 45 min (one vehicle maker)', () => {
    const limit = strictestLimit({ ...question, vehicle: battery({ celsius: 60, minutes: 45 }) });
    expect(limit.celsius).toEqual({ limit: 60, setBy: 'battery-recorded' });
    expect(limit.minutes).toEqual({ limit: 45, setBy: 'battery-recorded' });
  });

  it('never have 120 F rounded up: 48.889 C refuses 49 C', () => {
    const recorded = { celsius: celsiusFromFahrenheit(120), minutes: 45 };
    const limit = strictestLimit({ ...question, vehicle: battery(recorded) });
    expect(limit.celsius?.limit).toBeCloseTo(48.889, 3);
    const wanted = { minutes: 30, earlierHeatMinutes: 0 };
    expect(bakeRefusals(limit, { ...wanted, celsius: 49 }).map(({ code }) => code)).toEqual(['above-heat-limit']);
    expect(bakeRefusals(limit, { ...wanted, celsius: celsiusFromFahrenheit(120) })).toEqual([]);
  });

  it('are free of it once the battery is out', () => {
    const limit = strictestLimit({ ...question, vehicle: battery({ celsius: 60, minutes: 45 }, true) });
    expect(limit).toMatchObject({ celsius: { limit: 80, setBy: 'substrate-steel' }, minutes: null });
  });
});

describe('may this bake go ahead?', () => {
  const limit = strictestLimit({ ...question, vehicle: battery({ celsius: 60, minutes: 45 }) });

  it('counts heat over repeated bakes', () => {
    expect(bakeRefusals(limit, { celsius: 60, minutes: 30, earlierHeatMinutes: 15 })).toEqual([]);
    expect(bakeRefusals(limit, { celsius: 60, minutes: 30, earlierHeatMinutes: 20 })).toEqual([
      { code: 'beyond-heat-minutes', setBy: 'battery-recorded', wantedMinutes: 30, minutesLeft: 25 },
    ]);
    expect(bakeRefusals(limit, { celsius: 60, minutes: 1, earlierHeatMinutes: 90 })).toMatchObject([
      { minutesLeft: 0 },
    ]);
  });

  it('gives every reason at once', () => {
    const refusals = bakeRefusals(limit, { celsius: 65, minutes: 50, earlierHeatMinutes: 0 });
    expect(refusals).toEqual([
      { code: 'above-heat-limit', setBy: 'battery-recorded', wantedCelsius: 65, limitCelsius: 60 },
      { code: 'beyond-heat-minutes', setBy: 'battery-recorded', wantedMinutes: 50, minutesLeft: 45 },
    ]);
  });

  it('has no limit of minutes for a part on its own', () => {
    expect(bakeRefusals(strictestLimit(question), { celsius: 80, minutes: 600, earlierHeatMinutes: 600 })).toEqual([]);
  });
});
