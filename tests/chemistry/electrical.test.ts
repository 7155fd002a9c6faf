import { describe, expect, it } from 'vitest';
import { amperesFromKilowatts, kilowattsFromAmperes } from '#chemistry/electrical/amperes.ts';
import { isContinuous, usableKilowatts, usageFor, type Usage } from '#chemistry/electrical/circuit.ts';
import { lampsTogether } from '#chemistry/electrical/lamps-together.ts';
import { ratingNeeded, smallestBreaker } from '#chemistry/electrical/smallest-breaker.ts';

const threePhase = (volts: number, breakerAmperes: number) => ({ volts, phases: 3 as const, breakerAmperes });
const singlePhase = (volts: number, breakerAmperes: number) => ({ volts, phases: 1 as const, breakerAmperes });

describe('amperes', () => {
  it('of 6 kW at 208 V, three phases, are 16.654 (P / (sqrt 3 V), handbook)', () => {
    expect(amperesFromKilowatts(6, threePhase(208, 30))).toBeCloseTo(16.654, 3);
  });

  it('of 3 kW at 230 V, one phase, are 13.043 (P / V)', () => {
    expect(amperesFromKilowatts(3, singlePhase(230, 16))).toBeCloseTo(13.043, 3);
  });

  it('turn back into kilowatts', () => {
    const supply = threePhase(400, 32);
    expect(kilowattsFromAmperes(amperesFromKilowatts(7.5, supply), supply)).toBeCloseTo(7.5, 12);
  });
});

describe('lamps together on a circuit (80 % for continuous loads: NEC 210.20(A))', () => {
  it.each([
    [6, threePhase(208, 30), 'eighty-percent', 1],
    [6, threePhase(208, 50), 'eighty-percent', 2],
    [6, threePhase(400, 32), 'full', 3],
    [6, threePhase(400, 32), 'eighty-percent', 2],
    [3, singlePhase(230, 16), 'full', 1],
    [3, singlePhase(230, 16), 'eighty-percent', 0],
  ] as const)('%d kW lamps on %o, %s: %d', (kilowatts, circuit, usage, count) => {
    const lamps = Array.from({ length: 5 }, () => kilowatts);
    expect(lampsTogether(lamps, circuit, usage).together).toHaveLength(count);
  });

  it('takes the smallest lamps first and keeps to the order of the list', () => {
    const result = lampsTogether([6, 1.5, 3], singlePhase(230, 20), 'full');
    expect(result).toMatchObject({ allFit: false, together: [1, 2], togetherKilowatts: 4.5, allKilowatts: 10.5 });
    expect(result.togetherAmperes).toBeCloseTo(4500 / 230, 12);
    expect(result.usableKilowatts).toBeCloseTo(4.6, 12);
    expect(lampsTogether([3, 1.5], singlePhase(230, 20), 'full')).toMatchObject({ allFit: true, together: [0, 1] });
  });

  it('keeps to the circuit’s own kilowatts where they are less', () => {
    const circuit = { ...threePhase(400, 63), kilowattLimit: 9 };
    expect(usableKilowatts(circuit, 'full')).toBe(9);
    expect(lampsTogether([3, 3, 3, 3], circuit, 'full').together).toEqual([0, 1, 2]);
    expect(usableKilowatts({ ...circuit, kilowattLimit: 900 }, 'full')).toBeCloseTo(43.648, 3);
  });

  it('is not fooled by binary fractions: three of 0.1 kW fit 0.3 kW', () => {
    const circuit = { ...singlePhase(230, 16), kilowattLimit: 0.3 };
    expect(lampsTogether([0.1, 0.1, 0.1], circuit, 'full').allFit).toBe(true);
  });

  it('lets nothing run on a circuit without a lamp’s worth, and all of an empty list', () => {
    expect(lampsTogether([3], { ...singlePhase(230, 16), kilowattLimit: 0 }, 'full').together).toEqual([]);
    expect(lampsTogether([], singlePhase(230, 16), 'full').allFit).toBe(true);
  });
});

describe('continuous loads', () => {
  it('are those of three hours or more (NEC article 100)', () => {
    expect([isContinuous(179.9), isContinuous(180)]).toEqual([false, true]);
    const usages: Usage[] = [usageFor(20, false), usageFor(20, true), usageFor(240, false)];
    expect(usages).toEqual(['full', 'eighty-percent', 'eighty-percent']);
  });

  it('ask for 125 % of their amperes (NEC 210.20(A))', () => {
    expect(ratingNeeded(16, 'full')).toBe(16);
    expect(ratingNeeded(16, 'eighty-percent')).toBe(20);
  });
});

describe('smallest standard breaker (series from memory: NEC 240.6(A), IEC 60898-1)', () => {
  it.each([
    [16.654, 'full', 'north-america', 20],
    [16.654, 'eighty-percent', 'north-america', 25],
    [16, 'eighty-percent', 'north-america', 20],
    [13.043, 'full', 'europe', 16],
    [13.043, 'eighty-percent', 'europe', 20],
    [126, 'full', 'europe', null],
  ] as const)('%d A, %s, %s: %s', (amperes, usage, series, rating) => {
    expect(smallestBreaker(amperes, usage, series)).toBe(rating);
  });
});
