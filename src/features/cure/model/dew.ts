import { airStanding, type AirCode } from '#chemistry/air/air-standing.ts';
import { dewPointCelsius, dewPointFromWetBulbCelsius } from '#chemistry/air/dew-point.ts';
import { saturationPressurePascals } from '#chemistry/air/saturation-pressure.ts';
import { gateAtDewPoint, type SprayGate } from '#chemistry/air/spray-gate.ts';
import type { Finding } from '#chemistry/finding.ts';
import type { Values } from './desk-state.ts';
import { ranges, reader, type Answer } from './reader.ts';
import { limitForDisplay } from '#chemistry/units/temperature.ts';
import type { Unit } from './typed.ts';

export type DewAnswer = {
  gate: SprayGate;
  surfaceCelsius: number;
  airCelsius: number;
  humidityPercent: number;
  findings: Finding<AirCode>[];
};

const surface = { least: -10, most: 80 };

export function dewAnswer(values: Values, unit: Unit): Answer<DewAnswer> {
  const read = reader(values, unit);
  const airCelsius = read.celsius('air', ranges.air);
  const byBulb = values.by === 'wet';
  const humidity = byBulb ? NaN : read.number('rh', ranges.humidity);
  const wetBulbCelsius = byBulb ? read.celsius('wet', ranges.air) : NaN;
  const surfaceCelsius = read.celsius('surf', surface);
  if (byBulb && wetBulbCelsius > airCelsius) read.errors['wet'] = 'A wet bulb is never warmer than the air.';
  else if (byBulb && tooDry(airCelsius, wetBulbCelsius))
    read.errors['wet'] = 'Too cold for this air: no vapour would be left.';
  return read.answer(() => {
    const dewPoint = byBulb
      ? dewPointFromWetBulbCelsius({ airCelsius, wetBulbCelsius })
      : dewPointCelsius({ airCelsius, relativeHumidityPercent: humidity });
    const humidityPercent = byBulb
      ? Math.min(100, (100 * saturationPressurePascals(dewPoint)) / saturationPressurePascals(airCelsius))
      : humidity;
    const { findings } = airStanding({ airCelsius, relativeHumidityPercent: humidityPercent });
    return { gate: gateAtDewPoint(dewPoint, surfaceCelsius), surfaceCelsius, airCelsius, humidityPercent, findings };
  });
}

/** True where the wet bulb is so cold that the psychrometer equation leaves no vapour. */
function tooDry(airCelsius: number, wetBulbCelsius: number): boolean {
  if (Number.isNaN(airCelsius) || Number.isNaN(wetBulbCelsius)) return false;
  try {
    return dewPointFromWetBulbCelsius({ airCelsius, wetBulbCelsius }) < -60;
  } catch (error) {
    if (error instanceof RangeError) return true;
    throw error;
  }
}

/** A margin never reads larger than it is: 2.96 C must not show as the 3.0 that it misses. */
export const marginFigure = (marginCelsius: number, unit: Unit): number =>
  limitForDisplay(unit === 'C' ? marginCelsius : marginCelsius * 1.8, 1);
