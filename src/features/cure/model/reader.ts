import type { FieldKey, Values } from './desk-state.ts';
import { celsiusOf, parseNumber, plainNumber, unitFromCelsius, type Unit } from './typed.ts';

export type Errors = Partial<Record<string, string>>;
export type Range = { least: number; most: number };

/** An answer, or what is wrong in which field. */
export type Answer<T> = { ok: true; errors: Errors; value: T } | { ok: false; errors: Errors };

/**
 * Reads typed values and gathers what is wrong with them. A bad value reads as NaN: look at `answer` before using any, which
 * runs the reckoning only where every field made sense.
 */
export function reader(values: Values, unit: Unit) {
  const errors: Errors = {};
  const number = (key: FieldKey, range: Range) => {
    const found = numberFault(values[key], range);
    if (typeof found === 'number') return found;
    errors[key] = found;
    return NaN;
  };
  const celsius = (key: FieldKey, range: Range) => {
    const found = temperatureFault(values[key], range, unit);
    if (typeof found === 'number') return found;
    errors[key] = found;
    return NaN;
  };
  const answer = <T>(reckon: () => T): Answer<T> =>
    Object.keys(errors).length > 0 ? { ok: false, errors } : { ok: true, errors, value: reckon() };
  return { errors, number, celsius, answer };
}

/** The number, or what is wrong with it. */
export function numberFault(text: string, { least, most }: Range): number | string {
  const value = parseNumber(text);
  if (value === null) return text.trim() === '' ? 'Needs a number.' : 'That is not a number.';
  return value < least || value > most ? `From ${plainNumber(least, 3)} to ${plainNumber(most, 3)}.` : value;
}

/** Celsius, or what is wrong, in the reader's unit. */
export function temperatureFault(token: string, { least, most }: Range, unit: Unit): number | string {
  const value = celsiusOf(token);
  if (value === null) return /^[CF]?$/.test(token.trim()) ? 'Needs a temperature.' : 'That is not a temperature.';
  const said = (celsius: number) => plainNumber(unitFromCelsius(celsius, unit), 0);
  return value < least || value > most ? `From ${said(least)} to ${said(most)} °${unit}.` : value;
}

export const ranges = {
  air: { least: -10, most: 50 },
  humidity: { least: 1, most: 100 },
  metal: { least: -10, most: 200 },
  minutes: { least: 0.1, most: 20_160 },
  minutesOrNone: { least: 0, most: 20_160 },
} satisfies Record<string, Range>;
