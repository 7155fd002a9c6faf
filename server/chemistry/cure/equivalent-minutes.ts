import { GAS_CONSTANT, KELVIN_OFFSET } from '#chemistry/constants.ts';
import { temperature } from '#chemistry/quantity.ts';
import { activationEnergy } from './arrhenius.ts';
import { checkTrace, type Trace, type TraceRow } from './trace.ts';

export type CureScale = { referenceCelsius: number; kilojoulesPerMole: number };

/** Gauss-Legendre, five points on [-1, 1] (Abramowitz & Stegun, table 25.4). */
const NODES: readonly (readonly [at: number, weight: number])[] = [
  [0, 0.5688888888888889],
  [-0.5384693101056831, 0.47862867049936647],
  [0.5384693101056831, 0.47862867049936647],
  [-0.906179845938664, 0.23692688505618908],
  [0.906179845938664, 0.23692688505618908],
];

/** Below this the rate is nothing, and its steepness must not ask for endless pieces. */
const COLDEST_KELVIN = 200;

/**
 * Minutes at the reference temperature that a temperature trace is worth: the integral of `exp(Ea/R * (1/Tref - 1/T(t)))`
 * over a piecewise linear T(t). Each stretch is cut so that the rate changes at most about e-fold per piece, and each
 * piece is done by five-point Gauss-Legendre: the relative error stays below 1e-10 (a hold is exact), far under that of any
 * sensor. The trace is walked once, so 100,000 rows take milliseconds. Never negative; an empty trace is 0.
 *
 * @throws QuantityError for a row out of order or a temperature that cannot be
 */
export function equivalentMinutes(trace: Trace, scale: CureScale): number {
  checkTrace(trace);
  const perKelvin = (activationEnergy(scale.kilojoulesPerMole) * 1000) / GAS_CONSTANT;
  const atReference = perKelvin / (temperature('referenceCelsius', scale.referenceCelsius) + KELVIN_OFFSET);
  let total = 0;
  let from: TraceRow | undefined;
  for (const to of trace) {
    if (from !== undefined) total += stretch(from, to, perKelvin, atReference);
    from = to;
  }
  return total;
}

function stretch(from: TraceRow, to: TraceRow, perKelvin: number, atReference: number): number {
  const minutes = to.minutes - from.minutes;
  if (minutes === 0) return 0;
  const start = from.metalCelsius + KELVIN_OFFSET;
  const rise = to.metalCelsius - from.metalCelsius;
  if (rise === 0) return minutes * Math.exp(atReference - perKelvin / start);

  const coldest = Math.max(COLDEST_KELVIN, Math.min(start, start + rise));
  // At least one: a rise of the last binary digit underflows to none.
  const pieces = Math.max(1, Math.ceil((Math.abs(rise) * perKelvin) / (coldest * coldest)));
  let sum = 0;
  for (let piece = 0; piece < pieces; piece += 1) {
    for (const [at, weight] of NODES) {
      const kelvin = start + (rise * (piece + (at + 1) / 2)) / pieces;
      sum += weight * Math.exp(atReference - perKelvin / kelvin);
    }
  }
  return (minutes * sum) / (2 * pieces);
}
