import { celsiusFromFahrenheit, fahrenheitFromCelsius } from '#chemistry/units/temperature.ts';

export type Unit = 'C' | 'F';

/** A number as people type it: decimal point or comma, no thousands. Null where it is none. */
export function parseNumber(text: string): number | null {
  const plain = text.trim().replace('−', '-').replace(',', '.');
  return /^[+-]?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : null;
}

/**
 * A temperature is kept as it was typed, with the unit it was typed in: `140F`, `60C`. So a link means the same to a
 * reader of the other unit, and half a number on its way (`6`, `-`) is not turned into another.
 */
export const temperatureToken = (text: string, unit: Unit): string => text.trim() + unit;

function partsOf(token: string): { text: string; unit: Unit } {
  const unit = /[CF]$/.exec(token)?.[0];
  return unit === undefined ? { text: token, unit: 'C' } : { text: token.slice(0, -1), unit: unit as Unit };
}

/** Celsius of a token, or null where it is no number or colder than anything can be. */
export function celsiusOf(token: string): number | null {
  const { text, unit } = partsOf(token);
  const value = parseNumber(text);
  if (value === null || Math.abs(value) > 2000) return null;
  const celsius = unit === 'C' ? value : (value - 32) / 1.8;
  if (celsius <= -273.15) return null;
  return unit === 'C' ? value : celsiusFromFahrenheit(value);
}

/** What a reader of `unit` sees in the box: their own typing, or the other unit converted to two decimals. */
export function shownIn(token: string, unit: Unit): string {
  const parts = partsOf(token);
  if (parts.unit === unit) return parts.text;
  const celsius = celsiusOf(token);
  return celsius === null ? parts.text : plainNumber(unitFromCelsius(celsius, unit), 2);
}

export const unitFromCelsius = (celsius: number, unit: Unit): number =>
  unit === 'C' ? celsius : fahrenheitFromCelsius(celsius);

/** At most so many decimals and none that say nothing: `52.4`, `60`. */
export function plainNumber(value: number, decimals: number): string {
  const text = String(Number(value.toFixed(decimals)));
  return text === '-0' ? '0' : text.replace('-', '−');
}
