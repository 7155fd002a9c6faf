import { zeroOrMore } from '#chemistry/quantity.ts';

/** The international foot, exact by definition (1959). */
export const METRES_PER_FOOT = 0.3048;

const CUBIC_METRES_PER_CUBIC_FOOT = METRES_PER_FOOT ** 3;

export function cubicMetresFromCubicFeet(cubicFeet: number): number {
  return zeroOrMore('cubicFeet', cubicFeet) * CUBIC_METRES_PER_CUBIC_FOOT;
}

export function cubicFeetFromCubicMetres(cubicMetres: number): number {
  return zeroOrMore('cubicMetres', cubicMetres) / CUBIC_METRES_PER_CUBIC_FOOT;
}

/** Air flow, cubic feet per minute (cfm) to cubic metres per hour. */
export function cubicMetresPerHourFromCfm(cubicFeetPerMinute: number): number {
  return zeroOrMore('cubicFeetPerMinute', cubicFeetPerMinute) * CUBIC_METRES_PER_CUBIC_FOOT * 60;
}

export function cfmFromCubicMetresPerHour(cubicMetresPerHour: number): number {
  return zeroOrMore('cubicMetresPerHour', cubicMetresPerHour) / (CUBIC_METRES_PER_CUBIC_FOOT * 60);
}

/** Face velocity: 100 ft/min is 0.508 m/s. */
export function metresPerSecondFromFeetPerMinute(feetPerMinute: number): number {
  return (zeroOrMore('feetPerMinute', feetPerMinute) * METRES_PER_FOOT) / 60;
}
