import { describe, expect, it } from 'vitest';
import type { Circuit, Lamp } from '#contracts/lamps.ts';
import { kilowattsOf, newCircuit, togetherOn } from './model/circuit-form.ts';

const id = '018f3a00-0000-7000-8000-000000000501';
const circuit = (kilowatts: number, more: Partial<Circuit> = {}): Circuit => ({
  id,
  version: 1,
  name: 'Circuit',
  kilowatts,
  volts: null,
  phases: null,
  breakerAmperes: null,
  ...more,
});
const lamps = (...kilowatts: number[]): Lamp[] =>
  kilowatts.map((kw, i) => ({
    id,
    version: 1,
    name: `Lamp ${i + 1}`,
    circuitId: id,
    kilowatts: kw,
    wave: 'short',
    retired: false,
  }));

// P = sqrt(3) V I for three phases, P = V I for one; 80 % where continuous (NEC 210.20(A)).
describe('kilowatts from the breaker', () => {
  it.each([
    ['400', '3', '32', 22.17, 17.73],
    ['208', '3', '30', 10.8, 8.64],
    ['230', '1', '16', 3.68, 2.94],
  ] as const)('%s V, %s phases, %s A', (volts, phases, breaker, full, eighty) => {
    expect(kilowattsOf({ ...newCircuit, volts, phases, breaker })).toEqual({ full, eighty });
  });
  it('asks for both figures', () => {
    expect(kilowattsOf({ ...newCircuit, volts: '400' })).toBeNull();
    expect(kilowattsOf({ ...newCircuit, volts: '400', breaker: '0' })).toBeNull();
  });
});

// 6 kW at 208 V in three phases draw 16.654 A (P / (sqrt 3 V)): one on 30 A at 80 %, two on 50 A.
describe('lamps that burn together', () => {
  it('are those that fit below the limit, smallest first', () => {
    expect(togetherOn(circuit(11), lamps(6, 4.5))).toMatchObject({
      allFit: true,
      allKilowatts: 10.5,
      allAmperes: null,
    });
    expect(togetherOn(circuit(11), lamps(6, 6))).toMatchObject({
      allFit: false,
      together: ['Lamp 1'],
      allKilowatts: 12,
    });
    expect(togetherOn(circuit(2), lamps(3))).toMatchObject({ allFit: false, together: [] });
  });
  it('draw the amperes of their supply', () => {
    const three = circuit(20, { volts: 208, phases: 3 });
    expect(togetherOn(three, lamps(6)).allAmperes).toBeCloseTo(16.654, 3);
  });
});
