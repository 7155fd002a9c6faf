import { between, finite, QuantityError } from '#chemistry/quantity.ts';

/** "Above 75 % we wait a quarter longer": `{ abovePercent: 75, factor: 1.25 }`. The shop's experience, not physics. */
export type HumidityStep = { abovePercent: number; factor: number };

/**
 * The step that holds at this humidity: the largest factor among those passed. A factor of 1 where none is.
 *
 * @throws QuantityError for a factor under 1: damp air never shortens a flash
 */
export function humidityFactor(relativeHumidityPercent: number, steps: readonly HumidityStep[]): HumidityStep {
  let found: HumidityStep = { abovePercent: 0, factor: 1 };
  for (const step of steps) {
    between('abovePercent', step.abovePercent, 0, 100);
    if (finite('humidity factor', step.factor) < 1)
      throw new QuantityError('humidity factor', step.factor, '1 or more');
    if (relativeHumidityPercent > step.abovePercent && step.factor > found.factor) found = step;
  }
  return found;
}
