import { HAIR } from '#chemistry/constants.ts';
import { finite, QuantityError, zeroOrMore } from '#chemistry/quantity.ts';
import { wholeMilliseconds } from '#chemistry/rounding.ts';

/** Instants are milliseconds since 1970-01-01T00:00Z: a window is elapsed time, whatever the wall clock does. */
export type CoatWindow = {
  earliestMs: number;
  /** The last instant at which the next coat may begin without sanding, itself included; null where there is no end. */
  latestMs: number | null;
};

export type WindowMinutes = {
  /** Least wait: flash, dust-free time. */
  minimumMinutes: number;
  /** Most wait: the recoat window; null for none. */
  maximumMinutes: number | null;
};

/**
 * Earliest and latest start of what follows a coat. A sealer that ends Monday 09:00 with 15 min and 72 h: from Monday 09:15 to
 * Thursday 09:00.
 *
 * @throws QuantityError for a maximum below the minimum
 */
export function windowAfterCoat(coatEndedMs: number, { minimumMinutes, maximumMinutes }: WindowMinutes): CoatWindow {
  finite('coatEndedMs', coatEndedMs);
  const earliestMs = coatEndedMs + wholeMilliseconds(zeroOrMore('minimumMinutes', minimumMinutes));
  if (maximumMinutes === null) return { earliestMs, latestMs: null };
  if (zeroOrMore('maximumMinutes', maximumMinutes) < minimumMinutes - HAIR) {
    throw new QuantityError('maximumMinutes', maximumMinutes, `at least the minimum, ${minimumMinutes}`);
  }
  return { earliestMs, latestMs: coatEndedMs + wholeMilliseconds(maximumMinutes) };
}

export type WindowVerdict =
  | { code: 'too-early'; minutesToWait: number }
  /** `minutesLeft` is null where the window has no end. */
  | { code: 'in-window'; minutesLeft: number | null }
  | { code: 'missed'; minutesLate: number };

/** May the next coat begin at this instant? */
export function windowVerdict({ earliestMs, latestMs }: CoatWindow, startMs: number): WindowVerdict {
  const minutes = (milliseconds: number) => milliseconds / 60_000;
  if (finite('startMs', startMs) < earliestMs)
    return { code: 'too-early', minutesToWait: minutes(earliestMs - startMs) };
  if (latestMs === null) return { code: 'in-window', minutesLeft: null };
  if (startMs > latestMs) return { code: 'missed', minutesLate: minutes(startMs - latestMs) };
  return { code: 'in-window', minutesLeft: minutes(latestMs - startMs) };
}
