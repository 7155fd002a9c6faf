import { describe, expect, it } from 'vitest';
import { bakeSum, equivalentAnswer } from './bakes.ts';
import { circuitAnswer, shopCircuits } from './circuit.ts';
import { firstValues, type Values } from './desk-state.ts';
import { dewAnswer, marginFigure } from './dew.ts';
import { findingWords } from './finding-words.ts';
import { flashAnswer } from './flash.ts';
import { firstAt, lampAnswer } from './lamp.ts';
import type { Answer } from './reader.ts';
import { cureOf, sheetOf } from './sheet-of.ts';

const typed = (given: Partial<Values> = {}): Values => ({ ...firstValues, ...given });
function got<T>(answer: Answer<T> | null): T {
  if (!answer?.ok) throw new Error(JSON.stringify(answer));
  return answer.value;
}
/** Bake 30 min at 60 C; with or without 180 min at 20 C. */
const oneLine = got(sheetOf(null, typed(), 'C'));
const twoLines = got(sheetOf(null, typed({ dry: '180', dryat: '20C' }), 'C'));

describe('flash and cure in today’s air', () => {
  it('stretches by Arrhenius with 50 kJ/mol: from 20 to 30 C by 1.9674 (computed by hand)', () => {
    const answer = got(flashAnswer(typed({ air: '30C', heat: '30' }), twoLines, 'C'));
    // 10 / 1.9674 = 5.08, rounded up.
    expect(answer.rows.find(({ key }) => key === 'between')).toMatchObject({ printed: 10, today: 6 });
    expect(answer.reducer).toBe('slow');
    expect(answer.findings.map(({ code }) => code)).toContain('warmer-than-best');
  });

  it('is the printed time at the printed temperature, without a warning', () => {
    const answer = got(flashAnswer(typed(), twoLines, 'C'));
    expect(answer.rows.map(({ key, today }) => [key, today])).toEqual([
      ['between', 10],
      ['next', 15],
      ['heat', 15],
      ['dry', 180],
    ]);
    expect(answer.findings).toEqual([]);
  });

  it('adds the heat-up to a metal time only', () => {
    expect(got(flashAnswer(typed(), oneLine, 'C')).bake?.onTheClock).toBe(40);
    const air = got(sheetOf(null, typed({ measured: 'air' }), 'C'));
    expect(got(flashAnswer(typed(), air, 'C')).bake?.onTheClock).toBe(30);
  });

  it('says which field is wrong, in the reader’s unit', () => {
    const answer = flashAnswer(typed({ air: '200F', rh: 'x', damp: '0.5' }), oneLine, 'F');
    expect(answer).toMatchObject({
      ok: false,
      errors: { air: 'From 14 to 122 °F.', rh: 'That is not a number.', damp: 'From 1 to 10.' },
    });
  });
});

describe('bake equivalents', () => {
  it('30 min at 60 C is 52.4 min at 50 C with 50 kJ/mol (Arrhenius, by hand)', () => {
    const answer = got(equivalentAnswer(typed(), oneLine, 'C'));
    expect(answer.equivalentMinutes).toBeCloseTo(52.4, 1);
    expect(answer.energy).toEqual({ kilojoulesPerMole: 50, from: 'default' });
    expect(answer.findings.map(({ code }) => code)).toEqual(['activation-energy-assumed']);
  });

  it('fits 26.95 kJ/mol to "2 days at 60 C or 7 days at 22 C" (a coatings engineer’s article)', () => {
    const sheet = got(sheetOf(null, typed({ dry: '10080', dryat: '22C', bake: '2880' }), 'C'));
    const answer = got(equivalentAnswer(typed({ to: '70C' }), sheet, 'C'));
    expect(answer.energy.kilojoulesPerMole).toBeCloseTo(26.95, 2);
    expect(answer.energy.from).toBe('sheet');
    expect(answer.findings.map(({ code }) => code)).toEqual(['above-printed-temperatures']);
  });

  it('doubles from 298 to 308 K with 52.9 kJ/mol (textbook)', () => {
    const values = typed({ min: '10', from: '35C', to: '25C', ea: '52,9' });
    const answer = got(equivalentAnswer(values, twoLines, 'C'));
    expect(answer.equivalentMinutes).toBeCloseTo(20, 1);
    expect(answer.energy.from).toBe('typed');
  });

  it('uses the bake alone where the two lines contradict each other', () => {
    const sheet = got(sheetOf(null, typed({ dry: '20', dryat: '20C' }), 'C'));
    expect(cureOf(sheet, null)).toMatchObject({ energyFrom: 'default', contradiction: true });
  });

  it('follows the energy that the shop set on the sheet before one fitted to its lines', () => {
    const sheet = { ...got(sheetOf(null, typed({ dry: '180', dryat: '20C' }), 'C')), kilojoulesPerMole: 70 };
    expect(cureOf(sheet, null)).toMatchObject({ energyFrom: 'set', kinetics: { kilojoulesPerMole: 70 } });
    expect(cureOf(sheet, 55)).toMatchObject({ energyFrom: 'typed', kinetics: { kilojoulesPerMole: 55 } });
  });

  it('adds up bakes and tells what is left', () => {
    const sum = got(bakeSum(typed({ bakes: '10*60C_26.3*50C', rest: '60C' }), oneLine, 'C'));
    // 26.3 min at 50 C are a hair over half of the 52.4 that equal 30 min at 60 C.
    expect(sum.worth.map((minutes) => Number(minutes.toFixed(1)))).toEqual([10, 15]);
    expect(sum.restMinutes).toBe(5);
    expect(got(bakeSum(typed({ bakes: '30*60C' }), oneLine, 'C')).restMinutes).toBe(0);
    expect(bakeSum(typed({ bakes: 'x*60C' }), oneLine, 'C')?.errors).toEqual({
      'bakes.0.minutes': 'That is not a number.',
    });
  });

  it('takes a wrong energy as a wrong field', () => {
    const values = typed({ ea: '-5' });
    expect(equivalentAnswer(values, oneLine, 'C').errors).toEqual({ ea: 'From 1 to 200.' });
    expect(bakeSum(values, oneLine, 'C')?.errors).toEqual({ ea: 'From 1 to 200.' });
  });
});

describe('the dew point', () => {
  // ASHRAE Handbook Fundamentals 2017 by the library psychrolib; the Magnus form stays within 0.15 C of it.
  it.each([
    [25, 80, 21.309],
    [20, 50, 9.272],
    [20, 60, 12.007],
    [30, 70, 23.928],
  ])('of %d C and %d %% is %d', (air, rh, dewPoint) => {
    const { gate } = got(dewAnswer(typed({ air: `${air}C`, rh: String(rh) }), 'C'));
    expect(Math.abs(gate.dewPointCelsius - dewPoint)).toBeLessThan(0.15);
  });

  it('of 21 C with a wet bulb of 17 C is 15, and a surface of 19 may be sprayed (ISO 8502-4 practice, worked case)', () => {
    const { gate } = got(dewAnswer(typed({ by: 'wet', air: '21C', wet: '17C', surf: '19C' }), 'C'));
    expect(gate.dewPointCelsius).toBeCloseTo(15, 0);
    expect(gate.open).toBe(true);
  });

  it('of 16 C and 71 % is 11, and a surface of 13 may not (worked case)', () => {
    const { gate } = got(dewAnswer(typed({ air: '16C', rh: '71', surf: '13C' }), 'C'));
    expect(gate.dewPointCelsius).toBeCloseTo(11, 0);
    expect(gate.open).toBe(false);
  });

  it('never shows a missed margin as met', () => {
    expect(marginFigure(2.96, 'C')).toBe(2.9);
    expect(marginFigure(3, 'F')).toBe(5.4);
  });

  it('says what is wrong with a wet bulb', () => {
    const wrong = (wet: string) => dewAnswer(typed({ by: 'wet', wet }), 'C').errors['wet'];
    expect(wrong('25C')).toBe('A wet bulb is never warmer than the air.');
    expect(wrong('0C')).toBe('Too cold for this air: no vapour would be left.');
  });
});

describe('the lamp', () => {
  it('refuses a wish above the limit of the part', () => {
    const answer = got(lampAnswer(typed({ material: 'abs', want: '70C' }), null, 'C'));
    expect(answer.limit).toMatchObject({ celsius: 60, setBy: 'substrate-abs' });
    expect(answer.restDistance.code).toBe('above-limit');
  });

  it('holds an unrecorded battery to 49 C and 45 min', () => {
    const answer = got(lampAnswer(typed({ battery: 'unknown', want: '45C' }), null, 'C'));
    expect(answer.limit).toMatchObject({ celsius: 49, minutes: 45, setBy: 'battery-unrecorded' });
    expect(answer.heatUp).toMatchObject({ outcome: { code: 'limit-reached' } });
  });

  it('keeps 120 F at 48.889 C', () => {
    const answer = got(lampAnswer(typed({ battery: 'recorded', batat: '120F' }), null, 'F'));
    expect(answer.limit.celsius).toBeCloseTo(48.889, 3);
  });

  it('comes to rest where it should at the distance it offers', () => {
    const answer = got(lampAnswer(typed({ want: '75C' }), null, 'C'));
    if (answer.restDistance.code !== 'found') throw new Error(answer.restDistance.code);
    const there = got(lampAnswer(typed({ want: '75C', dist: String(answer.restDistance.distanceMetres) }), null, 'C'));
    expect(there.balanceCelsius).toBeCloseTo(75, 3);
  });

  it('takes twice the short-wave minutes for a medium wave (a trade article)', () => {
    const sheet = { ...oneLine, lampShort: { minutes: 25, metres: 0.7 } };
    expect(got(lampAnswer(typed({ wave: 'medium' }), sheet, 'C')).sheetMinutes).toEqual({
      minutes: 50,
      printed: false,
      metres: 0.7,
    });
  });

  it('finds a moment between two rows', () => {
    const trace = [
      { minutes: 0, metalCelsius: 20 },
      { minutes: 10, metalCelsius: 60 },
    ];
    expect(firstAt({ trace }, 50)).toBe(7.5);
    expect(firstAt({ trace }, 61)).toBeNull();
  });

  it('has nothing to reckon in a room as warm as the limit', () => {
    const values = typed({ battery: 'recorded', batat: '40C', air: '45C' });
    expect(got(lampAnswer(values, null, 'C')).heatUp).toBe('room-too-warm');
  });
});

describe('the circuit', () => {
  // P / (sqrt 3 V) and NEC 210.20(A).
  const ask = (given: Partial<Values>) => got(circuitAnswer(typed({ lamps: 'typed', ...given }), null, 'C'));

  it('6 kW at 208 V, three phases, is 16.654 A: one on 30 A and two on 50 A at 80 %', () => {
    const two = { kws: '6_6', volts: '208', amps: '30' };
    expect(ask(two).eachAmperes[0]).toBeCloseTo(16.654, 3);
    expect(ask(two).together).toEqual([0]);
    expect(ask({ ...two, amps: '50' }).together).toEqual([0, 1]);
  });

  it('three of 6 kW on 400 V and 32 A, two at 80 %', () => {
    const four = { kws: '6_6_6_6', amps: '32' };
    expect(ask({ ...four, eighty: 'no' }).together).toHaveLength(3);
    expect(ask(four).together).toHaveLength(2);
  });

  it('3 kW on 230 V and 16 A: one at 100 %, none at 80 %, nor where it burns for three hours', () => {
    const one = { kws: '3', volts: '230', phases: '1', amps: '16' };
    expect(ask({ ...one, eighty: 'no' }).together).toEqual([0]);
    expect(ask(one).together).toEqual([]);
    expect(ask({ ...one, eighty: 'no', hold: '180' })).toMatchObject({ together: [], continuous: true });
  });

  it('takes the lamps and the limit of the shop', () => {
    const lamp = (name: string, circuitId: string) => ({
      ...{ id: name, kind: 'lamp' as const, units: null, zone: null, closed: [], working: null },
      ...{ name, kilowatts: 6, circuitId },
    });
    const [a] = shopCircuits({
      circuits: [{ id: 'a', name: 'Circuit A', kilowatts: 11 }],
      rows: [lamp('Lamp 1', 'a'), lamp('Lamp 2', 'a'), lamp('Lamp 3', 'b')],
    });
    const answer = got(circuitAnswer(typed(), a ?? null, 'C'));
    expect(answer.lamps.map(({ name }) => name)).toEqual(['Lamp 1', 'Lamp 2']);
    expect(answer.together).toEqual([0]);
  });
});

describe('findings', () => {
  it('are sentences in the reader’s unit, limits never rounded up', () => {
    const finding = { code: 'above-heat-limit' as const, value: 52, limit: (120 - 32) / 1.8 };
    expect(findingWords(finding, 'F')).toContain('125.6 °F, above the limit of 120 °F');
    expect(findingWords(finding, 'C')).toContain('limit of 48.8 °C');
  });
});
