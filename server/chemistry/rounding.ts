import { finite } from '#chemistry/quantity.ts';

const MILLISECONDS_PER_MINUTE = 60_000;

/**
 * Minutes to whole milliseconds. Every rounding up below starts here: 180.000000045 s, which is three minutes and a
 * binary crumb, must not become 181 s.
 */
export function wholeMilliseconds(minutes: number): number {
  return Math.round(finite('minutes', minutes) * MILLISECONDS_PER_MINUTE);
}

/** Minutes, to the millisecond. */
export function minutesToMillisecond(minutes: number): number {
  return wholeMilliseconds(minutes) / MILLISECONDS_PER_MINUTE;
}

/** Seconds, rounded up: a least time is never shortened. */
export function wholeSecondsUp(minutes: number): number {
  return Math.ceil(wholeMilliseconds(minutes) / 1000);
}

/** Minutes, rounded up: a least time is never shortened. */
export function wholeMinutesUp(minutes: number): number {
  return Math.ceil(wholeMilliseconds(minutes) / MILLISECONDS_PER_MINUTE);
}

/** Minutes, rounded down: a most time is never stretched. */
export function wholeMinutesDown(minutes: number): number {
  return Math.floor(wholeMilliseconds(minutes) / MILLISECONDS_PER_MINUTE);
}
