import { positive, zeroOrMore } from '#chemistry/quantity.ts';
import { minutesToMillisecond, wholeMinutesUp, wholeSecondsUp } from '#chemistry/rounding.ts';

/** At least so long, or four changes of the enclosure's air, whichever is longer (International Fire Code 2018, ch. 24). */
export const LEAST_PURGE_MINUTES = 3;
export const PURGE_AIR_CHANGES = 4;

export type Enclosure = {
  /** Null where nobody has measured it. */
  cubicMetres: number | null;
  /** Measured or `defaultAirFlow`; null where unknown, 0 with the fan off. */
  cubicMetresPerHour: number | null;
};

export type Purge =
  | {
      heat: 'after-purge';
      /** To the millisecond. */
      minutes: number;
      wholeSeconds: number;
      wholeMinutes: number;
    }
  /** No heat may be planned or lit. */
  | { heat: 'refused'; code: 'volume-unknown' | 'air-flow-unknown' | 'no-air-flow' };

/**
 * The purge before heat goes on: `max(3 min, 4 V / Q)`. 96 m3 at 20,000 m3/h: 3 min; at 5,000 m3/h: 4.608 min.
 * Unknown or no air flow refuses heat: an answer, since booths without a measured fan are common.
 *
 * @throws QuantityError for a negative figure or a volume of 0
 */
export function purgeBeforeHeat({ cubicMetres, cubicMetresPerHour }: Enclosure): Purge {
  if (cubicMetres === null) return { heat: 'refused', code: 'volume-unknown' };
  positive('cubicMetres', cubicMetres);
  if (cubicMetresPerHour === null) return { heat: 'refused', code: 'air-flow-unknown' };
  if (zeroOrMore('cubicMetresPerHour', cubicMetresPerHour) === 0) return { heat: 'refused', code: 'no-air-flow' };

  const changes = (PURGE_AIR_CHANGES * cubicMetres * 60) / cubicMetresPerHour;
  const minutes = minutesToMillisecond(Math.max(LEAST_PURGE_MINUTES, changes));
  return { heat: 'after-purge', minutes, wholeSeconds: wholeSecondsUp(minutes), wholeMinutes: wholeMinutesUp(minutes) };
}
