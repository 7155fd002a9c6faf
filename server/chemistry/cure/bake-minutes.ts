import { positive, zeroOrMore } from '#chemistry/quantity.ts';
import { wholeMinutesUp } from '#chemistry/rounding.ts';

/** What a sheet's bake time is counted from: the metal at temperature, or the booth's air at temperature. */
export type BakeReference = 'metal' | 'air';

export type BakePlan = {
  /** As printed, or as `cureMinutesAt` gives for another set point. */
  minutes: number;
  reference: BakeReference;
  /** Until the metal follows the air, as the shop has measured it or `heatUp` reckons it. */
  heatUpMinutes: number;
};

/**
 * Whole minutes for which the heat is on. Only a metal time gets the heat-up on top: an air time already holds it, and adding
 * it twice would bake away an hour of booth a day.
 */
export function bakeMinutesOnTheClock({ minutes, reference, heatUpMinutes }: BakePlan): number {
  const cure = positive('minutes', minutes);
  const heatUp = zeroOrMore('heatUpMinutes', heatUpMinutes);
  return wholeMinutesUp(reference === 'metal' ? cure + heatUp : cure);
}
