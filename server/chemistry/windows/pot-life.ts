import { DEFAULT_KILOJOULES_PER_MOLE, timeRatio } from '#chemistry/cure/arrhenius.ts';
import { finite, positive } from '#chemistry/quantity.ts';
import { wholeMilliseconds, wholeMinutesDown } from '#chemistry/rounding.ts';

/** Mixed product: when, and how long the sheet gives it. Instants in milliseconds since 1970-01-01T00:00Z. */
export type Mix = { mixedMs: number; potLifeMinutes: number };

export type PotLifeVerdict =
  | { code: 'usable'; minutesLeft: number }
  | { code: 'expired'; minutesOver: number }
  /** The coat would begin before the product is mixed. */
  | { code: 'not-mixed-yet'; minutesBefore: number };

/** The last instant at which a coat of this mix may begin, itself included. */
export function potLifeEndMs({ mixedMs, potLifeMinutes }: Mix): number {
  return finite('mixedMs', mixedMs) + wholeMilliseconds(positive('potLifeMinutes', potLifeMinutes));
}

/** May a coat of this mix begin at this instant? 45 min, mixed 10:00: 10:44 yes, 10:46 no. */
export function potLifeVerdict(mix: Mix, coatStartMs: number): PotLifeVerdict {
  const endMs = potLifeEndMs(mix);
  if (finite('coatStartMs', coatStartMs) < mix.mixedMs) {
    return { code: 'not-mixed-yet', minutesBefore: (mix.mixedMs - coatStartMs) / 60_000 };
  }
  if (coatStartMs > endMs) return { code: 'expired', minutesOver: (coatStartMs - endMs) / 60_000 };
  return { code: 'usable', minutesLeft: (endMs - coatStartMs) / 60_000 };
}

/**
 * Pot life in a warmer mixing room, whole minutes rounded down: Arrhenius with the default energy (from memory; the sheet's
 * own figure goes before it). A cold room earns nothing: never longer than printed.
 */
export function potLifeMinutesAt(
  printed: { minutes: number; celsius: number },
  roomCelsius: number,
  kilojoulesPerMole: number = DEFAULT_KILOJOULES_PER_MOLE,
): number {
  const ratio = timeRatio(roomCelsius, printed.celsius, kilojoulesPerMole);
  return wholeMinutesDown(positive('minutes', printed.minutes) * Math.min(1, ratio));
}
