import type { Finding } from '#chemistry/finding.ts';
import { outsidePrinted, type RangeCode } from '#chemistry/printed-points.ts';
import { zeroOrMore } from '#chemistry/quantity.ts';
import { wholeMinutesUp } from '#chemistry/rounding.ts';
import { timeRatio } from './arrhenius.ts';
import type { Kinetics, KineticsCode } from './kinetics.ts';

export type CureCode = KineticsCode | RangeCode;

export type CureMinutes = {
  /** Not rounded. */
  minutes: number;
  /** Rounded up. */
  wholeMinutes: number;
  findings: Finding<CureCode>[];
};

/**
 * The time a full cure takes at a temperature held throughout: a bake at another set point, or air drying at the shop's own
 * temperature. 30 min at 60 C is 52.4 min at 50 C with 50 kJ/mol.
 */
export function cureMinutesAt(kinetics: Kinetics, celsius: number): CureMinutes {
  return minutesStillToCure(kinetics, 0, celsius);
}

/**
 * The time still to bake at `celsius`, after bakes that were worth `doneReferenceMinutes` at the reference temperature (see
 * `equivalentMinutes` and `addBakes`). 0 once the cure is complete.
 */
export function minutesStillToCure(kinetics: Kinetics, doneReferenceMinutes: number, celsius: number): CureMinutes {
  const done = zeroOrMore('doneReferenceMinutes', doneReferenceMinutes);
  const left = Math.max(0, kinetics.referenceMinutes - done);
  const minutes = left * timeRatio(celsius, kinetics.referenceCelsius, kinetics.kilojoulesPerMole);
  const outside = outsidePrinted(celsius, kinetics.coldestCelsius, kinetics.hottestCelsius);
  const findings: Finding<CureCode>[] = [...kinetics.findings];
  if (outside !== null) findings.push(outside);
  return { minutes, wholeMinutes: wholeMinutesUp(minutes), findings };
}
