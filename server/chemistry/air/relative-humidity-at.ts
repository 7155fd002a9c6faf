import { vapourPascals, type Air } from './dew-point.ts';
import { saturationPressurePascals } from './saturation-pressure.ts';

/**
 * Relative humidity, percent, of the same air after a heater or a cold night: its vapour, and so its dew point, stay as they
 * were. 20 C and 50 % heated to 60 C is 5.9 %. Below its dew point air stays saturated and drops the rest: 100 %.
 */
export function relativeHumidityPercentAt(air: Air, newAirCelsius: number): number {
  return Math.min(100, (100 * vapourPascals(air)) / saturationPressurePascals(newAirCelsius));
}
