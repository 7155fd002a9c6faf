import { STANDARD_PRESSURE_PASCALS } from '#chemistry/constants.ts';
import { between, positive, QuantityError } from '#chemistry/quantity.ts';
import { saturationCelsius, saturationPressurePascals } from './saturation-pressure.ts';

/** Air as a shop measures it. Humidity in percent, 0 < RH <= 100: quite dry air has no dew point. */
export type Air = { airCelsius: number; relativeHumidityPercent: number };

export function vapourPascals({ airCelsius, relativeHumidityPercent }: Air): number {
  positive('relativeHumidityPercent', relativeHumidityPercent);
  between('relativeHumidityPercent', relativeHumidityPercent, 0, 100);
  return (saturationPressurePascals(airCelsius) * relativeHumidityPercent) / 100;
}

/**
 * Dew point, C: where a surface that cold begins to sweat. 25 C and 80 % give 21.3 C.
 *
 * @throws QuantityError for humidity of 0 or above 100 %, or air outside -60 to 150 C
 */
export function dewPointCelsius(air: Air): number {
  return saturationCelsius(vapourPascals(air));
}

export type Psychrometer = { airCelsius: number; wetBulbCelsius: number; pressurePascals?: number };

/**
 * Dew point, C, from a sling or fan psychrometer, by the psychrometer equation with the coefficient for ventilated
 * instruments, `6.53e-4 (1 + 0.000944 tw)` per kelvin (WMO Guide to Instruments No. 8; from memory).
 *
 * @throws QuantityError where the wet bulb is warmer than the air, or so cold that no vapour would be left
 */
export function dewPointFromWetBulbCelsius(reading: Psychrometer): number {
  const { airCelsius, wetBulbCelsius, pressurePascals = STANDARD_PRESSURE_PASCALS } = reading;
  if (wetBulbCelsius > airCelsius) {
    throw new QuantityError('wetBulbCelsius', wetBulbCelsius, `at most the air's ${airCelsius}`);
  }
  const coefficient = 6.53e-4 * (1 + 0.000944 * wetBulbCelsius);
  saturationPressurePascals(airCelsius);
  const dryingPascals = coefficient * positive('pressurePascals', pressurePascals) * (airCelsius - wetBulbCelsius);
  const pascals = saturationPressurePascals(wetBulbCelsius) - dryingPascals;
  if (!(pascals > 0)) throw new QuantityError('wetBulbCelsius', wetBulbCelsius, 'nearer to the air temperature');
  return saturationCelsius(pascals);
}
