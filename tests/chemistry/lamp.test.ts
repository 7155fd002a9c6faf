import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { balanceCelsius } from '#chemistry/infrared/balance-temperature.ts';
import { energyBalance, lostWatts, type LampSetup } from '#chemistry/infrared/energy-balance.ts';
import { lampDistance } from '#chemistry/infrared/lamp-distance.ts';
import { lampPositions } from '#chemistry/infrared/lamp-positions.ts';
import { heatCapacityPerSquareMetre, PANEL_MATERIALS } from '#chemistry/infrared/panel-materials.ts';
import { lampMinutesForBand, peakMicrometres, waveBand } from '#chemistry/infrared/wave-band.ts';
import { viewFactor } from '#chemistry/infrared/view-factor.ts';
import { holds } from './holds.ts';

const steel = { joulesPerSquareMetreKelvin: heatCapacityPerSquareMetre('steel', 0.8) };
const setup: LampSetup = {
  lamp: { kilowatts: 3, widthMetres: 1, heightMetres: 0.5 },
  panel: steel,
  surroundings: { airCelsius: 20 },
  distanceMetres: 0.7,
};

describe('heat capacity of a square metre of panel (handbook densities and specific heats)', () => {
  it.each([
    ['steel', 0.8, 3132],
    ['aluminium', 1, 2435],
    ['polypropylene', 3, 5159],
  ] as const)('%s, %d mm: %d J/(m2 K)', (material, millimetres, expected) => {
    expect(Math.round(heatCapacityPerSquareMetre(material, millimetres))).toBe(expected);
  });

  it('marks what is from memory', () => {
    expect(PANEL_MATERIALS.steel.mark).toBe('published');
    expect(PANEL_MATERIALS.polypropylene.mark).toBe('from-memory');
  });
});

describe('loss of a panel at 60 C in a 20 C room', () => {
  it('is 251.8 W/m2 by radiation at emissivity 0.9 (Stefan-Boltzmann) and 200 by convection', () => {
    const still = { ...setup, surroundings: { airCelsius: 20, convectionWattsPerSquareMetreKelvin: 0 } };
    expect(lostWatts(energyBalance(still), 333.15)).toBeCloseTo(251.8, 1);
    expect(lostWatts(energyBalance(setup), 333.15)).toBeCloseTo(451.8, 1);
  });
});

/** The balance written anew and found by halving: nothing of the product's in it but the view factor. */
function balanceByBisection(kilowatts: number, distanceMetres: number, airCelsius: number, convection: number): number {
  const lit = viewFactor({ widthMetres: 1, heightMetres: 0.5, distanceMetres });
  const absorbed = (0.9 * 0.85 * kilowatts * 1000 * lit) / 0.5;
  const room = airCelsius + 273.15;
  const surplus = (kelvin: number) =>
    absorbed - 0.9 * 5.670374419e-8 * (kelvin ** 4 - room ** 4) - convection * (kelvin - room);
  let [cold, hot] = [room, room + 3000];
  for (let round = 0; round < 100; round += 1) {
    const middle = (cold + hot) / 2;
    if (surplus(middle) > 0) cold = middle;
    else hot = middle;
  }
  return cold - 273.15;
}

describe('balance temperature', () => {
  it('agrees with an independent root finder', () => {
    holds(
      fc.property(
        fc.double({ min: 0, max: 20, noNaN: true }),
        fc.double({ min: 0.2, max: 5, noNaN: true }),
        fc.double({ min: -10, max: 40, noNaN: true }),
        fc.double({ min: 0, max: 30, noNaN: true }),
        (kilowatts, distanceMetres, airCelsius, convection) => {
          const surroundings = { airCelsius, convectionWattsPerSquareMetreKelvin: convection };
          const ours = balanceCelsius({ ...setup, lamp: { ...setup.lamp, kilowatts }, surroundings, distanceMetres });
          expect(ours).toBeCloseTo(balanceByBisection(kilowatts, distanceMetres, airCelsius, convection), 6);
        },
      ),
    );
  });

  it('is the room’s where no lamp burns, and nearly so where the lamp is far', () => {
    expect(balanceCelsius({ ...setup, lamp: { ...setup.lamp, kilowatts: 0 } })).toBeCloseTo(20, 9);
    expect(balanceCelsius(setup, 0)).toBeCloseTo(20, 9);
    const far = balanceCelsius({ ...setup, distanceMetres: 100 });
    expect(far).toBeGreaterThan(20);
    expect(far).toBeLessThan(20.1);
  });

  it('is lower at half power', () => {
    expect(balanceCelsius(setup, 0.5)).toBeLessThan(balanceCelsius(setup));
    expect(() => balanceCelsius(setup, 1.1)).toThrow(/power must be between 0 and 1/);
  });
});

describe('distance for a wanted metal temperature', () => {
  const { lamp, panel, surroundings } = setup;
  const question = { lamp, panel, surroundings, limitCelsius: 80 };

  it('is where the panel comes to rest at it', () => {
    const wantedCelsius = balanceByBisection(3, 0.75, 20, 5);
    const found = lampDistance({ ...question, wantedCelsius, limitCelsius: 120 });
    expect(found).toMatchObject({ code: 'found', mustBePutOut: false });
    if (found.code !== 'found') return;
    expect(found.distanceMetres).toBeCloseTo(0.75, 6);
    expect(found.metalCelsius).toBeLessThanOrEqual(wantedCelsius);
    expect(found.metalCelsius).toBeCloseTo(wantedCelsius, 6);
  });

  it('may ask for a time, and then says that the lamp must be put out', () => {
    const strong = { ...question, lamp: { ...lamp, kilowatts: 6 } };
    const found = lampDistance({ ...strong, wantedCelsius: 60, withinMinutes: 2 });
    expect(found.code).toBe('found');
    if (found.code !== 'found') return;
    expect(found.metalCelsius).toBeCloseTo(60, 3);
    expect(found.restsAtCelsius).toBeGreaterThan(80);
    expect(found.mustBePutOut).toBe(true);
    const gentle = lampDistance({ ...strong, wantedCelsius: 60, withinMinutes: 2, halfPowerMinutes: 0.5 });
    // Half power first costs time, so the lamp has to come nearer.
    expect(gentle.code).toBe('found');
    if (gentle.code === 'found') expect(gentle.distanceMetres).toBeLessThan(found.distanceMetres - 0.05);
  });

  it('offers none above the part’s limit', () => {
    const refused = lampDistance({ ...question, wantedCelsius: 81 });
    expect(refused).toEqual({ code: 'above-limit', wantedCelsius: 81, limitCelsius: 80 });
  });

  it('says too weak and too strong, with what the panel would come to', () => {
    const weak = lampDistance({ ...question, lamp: { ...lamp, kilowatts: 0.3 }, wantedCelsius: 60 });
    expect(weak).toMatchObject({ code: 'too-weak', distanceMetres: 0.6 });
    const strong = lampDistance({ ...question, lamp: { ...lamp, kilowatts: 12 }, wantedCelsius: 60 });
    expect(strong).toMatchObject({ code: 'too-strong', distanceMetres: 0.9 });
    const none = lampDistance({ ...question, lamp: { ...lamp, kilowatts: 0 }, wantedCelsius: 60 });
    expect(none).toMatchObject({ code: 'too-weak' });
  });

  it('refuses distances in the wrong order', () => {
    const turned = { ...question, wantedCelsius: 60, nearestMetres: 0.9, farthestMetres: 0.6 };
    expect(() => lampDistance(turned)).toThrow(/nearestMetres must be less than/);
  });
});

describe('lamp positions over a panel', () => {
  const panel = (widthMetres: number, heightMetres: number) => ({ widthMetres, heightMetres });
  const field = { widthMetres: 1, heightMetres: 0.5 };

  it('needs one where the field covers the panel, upright or turned', () => {
    expect(lampPositions(panel(1, 0.5), field)).toEqual({ positions: 1, across: 1, down: 1, turned: false });
    expect(lampPositions(panel(0.5, 1), field)).toEqual({ positions: 1, across: 1, down: 1, turned: true });
  });

  it('overlaps neighbours: 1.9 m by fields of 1 m with 0.1 m over is two, a hair more is three', () => {
    expect(lampPositions(panel(1.9, 0.5), field).positions).toBe(2);
    expect(lampPositions(panel(1.91, 0.5), field).positions).toBe(3);
  });

  it('is not fooled by binary fractions: 0.3 m by fields of 0.1 m edge to edge is three', () => {
    expect(lampPositions(panel(0.1 + 0.2, 0.1), panel(0.1, 0.1), 0).positions).toBe(3);
  });

  it('refuses an overlap as wide as the field', () => {
    expect(() => lampPositions(panel(2, 2), field, 0.5)).toThrow(/overlapMetres/);
  });
});

describe('short and medium wave (Wien: 2897.771955 um K)', () => {
  it('puts 2500 K at 1.159 um, short, and 1200 K at 2.415 um, medium', () => {
    expect(peakMicrometres(2500)).toBeCloseTo(1.159, 3);
    expect(peakMicrometres(1200)).toBeCloseTo(2.415, 3);
    expect([waveBand(2500), waveBand(1200), waveBand(700)]).toEqual(['short', 'medium', 'long']);
  });

  it('takes about twice as long by medium wave (trade article)', () => {
    expect(lampMinutesForBand(12, 'short')).toBe(12);
    expect(lampMinutesForBand(12, 'medium')).toBe(24);
    expect(lampMinutesForBand(12, 'long')).toBeNull();
  });
});
