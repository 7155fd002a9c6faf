import { dewPointCelsius } from '#chemistry/air/dew-point.ts';
import { dewPointMarginCelsius, gateAtDewPoint } from '#chemistry/air/spray-gate.ts';
import type { AirGate, AirSettings } from '#contracts/air.ts';
import type { ReadingOfZone } from '#server/db/air-readings.ts';

/**
 * The gate before spraying, for a reading. Where nobody measured the surface it is taken to be as warm as the air, which a
 * part that has stood in the zone is; one brought in from the cold is not, so measuring is better.
 */
export function gateOf(
  reading: Pick<ReadingOfZone, 'at' | 'celsius' | 'humidity' | 'surfaceCelsius'>,
  { freshMinutes, marginCelsius }: Pick<AirSettings, 'freshMinutes' | 'marginCelsius'>,
  now: Date,
): AirGate {
  const surfaceCelsius = reading.surfaceCelsius ?? reading.celsius;
  const base = {
    fresh: now.getTime() - reading.at.getTime() <= freshMinutes * 60_000,
    surfaceCelsius,
    surfaceMeasured: reading.surfaceCelsius !== null,
    neededCelsius: marginCelsius,
  };
  // Air without vapour never sweats.
  if (reading.humidity === 0) return { ...base, open: true, dewPointCelsius: null, marginCelsius: null };
  const dewPoint = dewPointCelsius({ airCelsius: reading.celsius, relativeHumidityPercent: reading.humidity });
  return {
    ...base,
    open: gateAtDewPoint(dewPoint, surfaceCelsius, marginCelsius).open,
    dewPointCelsius: dewPoint,
    marginCelsius: dewPointMarginCelsius(surfaceCelsius, dewPoint),
  };
}
