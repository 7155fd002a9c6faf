import { positive, QuantityError, zeroOrMore } from '#chemistry/quantity.ts';

export type Phases = 1 | 3;

/** Volts between the lines that feed the load: line to neutral or line to line for one phase, line to line for three. */
export type Supply = { volts: number; phases: Phases };

function voltsAcross({ volts, phases }: Supply): number {
  positive('volts', volts);
  if (phases === 1) return volts;
  if (phases === 3) return Math.sqrt(3) * volts;
  throw new QuantityError('phases', phases, '1 or 3');
}

/**
 * Current of a resistive load (power factor 1, as lamps are): `P / V` for one phase, `P / (sqrt 3 V)` for three.
 * 6 kW at 208 V, three phases: 16.654 A.
 */
export function amperesFromKilowatts(kilowatts: number, supply: Supply): number {
  return (zeroOrMore('kilowatts', kilowatts) * 1000) / voltsAcross(supply);
}

export function kilowattsFromAmperes(amperes: number, supply: Supply): number {
  return (zeroOrMore('amperes', amperes) * voltsAcross(supply)) / 1000;
}
