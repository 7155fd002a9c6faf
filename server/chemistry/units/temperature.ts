import { KELVIN_OFFSET } from '#chemistry/constants.ts';
import { finite, temperature } from '#chemistry/quantity.ts';

/** A temperature: 25 C is 77 F. */
export function fahrenheitFromCelsius(celsius: number): number {
  return temperature('celsius', celsius) * 1.8 + 32;
}

/** A temperature: 120 F is 48.889 C. Not rounded, so that a limit given in Fahrenheit never grows on the way. */
export function celsiusFromFahrenheit(fahrenheit: number): number {
  const celsius = (finite('fahrenheit', fahrenheit) - 32) / 1.8;
  temperature('celsius', celsius);
  return celsius;
}

/** A difference of temperatures, without the 32: 3 C of margin are 5.4 F. */
export function fahrenheitDifferenceFromCelsius(celsiusDifference: number): number {
  return finite('celsiusDifference', celsiusDifference) * 1.8;
}

/** A difference of temperatures, without the 32: 5 F of margin are only 2.78 C. */
export function celsiusDifferenceFromFahrenheit(fahrenheitDifference: number): number {
  return finite('fahrenheitDifference', fahrenheitDifference) / 1.8;
}

export function kelvinFromCelsius(celsius: number): number {
  return temperature('celsius', celsius) + KELVIN_OFFSET;
}

export function celsiusFromKelvin(kelvin: number): number {
  return temperature('celsius', finite('kelvin', kelvin) - KELVIN_OFFSET);
}

/** For showing a limit: rounded down, so 48.889 C shows as 48.8 or 48, never as 49. Decimals from 0 to 6. */
export function limitForDisplay(limit: number, decimals = 0): number {
  const scale = 10 ** decimals;
  // A hair of 1e-6 steps keeps 60.3 from showing as 60.2 because of its binary form.
  return Math.floor(finite('limit', limit) * scale + 1e-6) / scale;
}
