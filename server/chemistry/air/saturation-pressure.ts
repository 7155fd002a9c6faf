import { between, positive } from '#chemistry/quantity.ts';

/**
 * Magnus form over water with the coefficients of Alduchov & Eskridge (1996), Journal of Applied Meteorology 35, 601-609:
 * `es = 610.94 Pa * exp(17.625 T / (243.04 + T))`. Fitted for -40 to 50 C; against the ASHRAE Fundamentals 2017 equations
 * its dew points stay within 0.15 C for air from 0 to 60 C.
 */
const AT_ZERO_PASCALS = 610.94;
const SLOPE = 17.625;
const SHIFT_CELSIUS = 243.04;

/** Colder or hotter than any shop, booth or bake; the Magnus form means nothing there. */
const COLDEST_CELSIUS = -60;
const HOTTEST_CELSIUS = 150;

/** Pressure of water vapour in saturated air, Pa. */
export function saturationPressurePascals(airCelsius: number): number {
  between('airCelsius', airCelsius, COLDEST_CELSIUS, HOTTEST_CELSIUS);
  return AT_ZERO_PASCALS * Math.exp((SLOPE * airCelsius) / (SHIFT_CELSIUS + airCelsius));
}

/** The temperature at which vapour of that pressure is saturated: its dew point, C. */
export function saturationCelsius(vapourPascals: number): number {
  const logarithm = Math.log(positive('vapourPascals', vapourPascals) / AT_ZERO_PASCALS);
  return (SHIFT_CELSIUS * logarithm) / (SLOPE - logarithm);
}
