import { positive } from '#chemistry/quantity.ts';

/**
 * 100 ft/min through the face of a dry booth while spraying (29 CFR 1910.107(b)(5)(i)): 0.508 m/s. A stand-in
 * until the flow is measured: loaded filters bring a booth below it.
 */
export const DRY_BOOTH_METRES_PER_SECOND = 0.508;

/** Air flow where none was measured: cross-section that the air crosses times its velocity, m3/h. */
export function defaultAirFlow(
  crossSectionSquareMetres: number,
  metresPerSecond: number = DRY_BOOTH_METRES_PER_SECOND,
): number {
  return (
    positive('crossSectionSquareMetres', crossSectionSquareMetres) * positive('metresPerSecond', metresPerSecond) * 3600
  );
}
