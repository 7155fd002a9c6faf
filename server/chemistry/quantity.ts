/**
 * The one habit for bad numbers in this folder: what cannot be true (NaN, a negative time, a temperature below absolute
 * zero, an air flow in letters) throws a `QuantityError` that names the quantity. What a shop must expect to happen (air
 * flow not known, a part's limit reached, a window missed) is an answer and is returned as a value with a code.
 */
export class QuantityError extends RangeError {
  override readonly name = 'QuantityError';
  /** The name of the quantity, with its unit, as the caller passed it: `airCelsius`. */
  readonly quantity: string;
  readonly given: unknown;
  /** What it would have to be, in words for a log: `more than 0`. */
  readonly need: string;

  constructor(quantity: string, given: unknown, need: string) {
    super(`${quantity} must be ${need}, not ${String(given)}`);
    this.quantity = quantity;
    this.given = given;
    this.need = need;
  }
}

export const ABSOLUTE_ZERO_CELSIUS = -273.15;
/** No paint shop is hotter; a larger figure is a slip of the keyboard or kelvin taken for Celsius twice. */
const HOTTEST_CELSIUS = 2000;

export function finite(quantity: string, value: number): number {
  if (!Number.isFinite(value)) throw new QuantityError(quantity, value, 'a finite number');
  return value;
}

export function positive(quantity: string, value: number): number {
  if (!(finite(quantity, value) > 0)) throw new QuantityError(quantity, value, 'more than 0');
  return value;
}

export function zeroOrMore(quantity: string, value: number): number {
  if (!(finite(quantity, value) >= 0)) throw new QuantityError(quantity, value, '0 or more');
  return value;
}

/** Both ends belong to the range. */
export function between(quantity: string, value: number, least: number, most: number): number {
  if (finite(quantity, value) < least || value > most) {
    throw new QuantityError(quantity, value, `between ${least} and ${most}`);
  }
  return value;
}

/** A temperature that a thing can have: above absolute zero, below 2000 C. */
export function temperature(quantity: string, celsius: number): number {
  if (finite(quantity, celsius) <= ABSOLUTE_ZERO_CELSIUS || celsius > HOTTEST_CELSIUS) {
    throw new QuantityError(quantity, celsius, `above ${ABSOLUTE_ZERO_CELSIUS} and at most ${HOTTEST_CELSIUS} Celsius`);
  }
  return celsius;
}

/** More than 0 and at most 1. */
export function fraction(quantity: string, value: number): number {
  if (!(finite(quantity, value) > 0) || value > 1)
    throw new QuantityError(quantity, value, 'more than 0 and at most 1');
  return value;
}
