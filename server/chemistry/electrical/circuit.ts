import { positive, zeroOrMore } from '#chemistry/quantity.ts';
import { kilowattsFromAmperes, type Supply } from './amperes.ts';

/** A load that burns for three hours or more is continuous (NEC article 100). */
export const CONTINUOUS_MINUTES = 180;

/** A breaker carries 1/1.25 of its rating for a continuous load (NEC 210.20(A)); many shops hold to it always. */
export const CONTINUOUS_SHARE = 0.8;

/** How much of the breaker the shop lets lamps use. A planning figure; the licensed electrician decides. */
export type Usage = 'full' | 'eighty-percent';

export type LampCircuit = Supply & {
  breakerAmperes: number;
  /** A lower limit of its own, such as a demand contract or the cable; none where null or absent. */
  kilowattLimit?: number | null;
};

export function isContinuous(minutes: number): boolean {
  return zeroOrMore('minutes', minutes) >= CONTINUOUS_MINUTES;
}

/** Eighty percent wherever a load is continuous or the shop always keeps to it. */
export function usageFor(minutes: number, shopKeepsEightyPercent: boolean): Usage {
  return shopKeepsEightyPercent || isContinuous(minutes) ? 'eighty-percent' : 'full';
}

export function usableAmperes(circuit: LampCircuit, usage: Usage): number {
  return positive('breakerAmperes', circuit.breakerAmperes) * (usage === 'full' ? 1 : CONTINUOUS_SHARE);
}

/** What all lamps on the circuit may draw together, kW: by the breaker or by its own limit, whichever is less. */
export function usableKilowatts(circuit: LampCircuit, usage: Usage): number {
  const byBreaker = kilowattsFromAmperes(usableAmperes(circuit, usage), circuit);
  const limit = circuit.kilowattLimit ?? null;
  return limit === null ? byBreaker : Math.min(byBreaker, zeroOrMore('kilowattLimit', limit));
}
