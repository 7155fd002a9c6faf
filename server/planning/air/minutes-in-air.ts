import { DEFAULT_KILOJOULES_PER_MOLE } from '#chemistry/cure/arrhenius.ts';
import { flashMinutes } from '#chemistry/flash/flash-minutes.ts';
import { humidityFactor } from '#chemistry/flash/humidity-factor.ts';
import type { PrintedPoint } from '#chemistry/printed-points.ts';
import { wholeMinutesUp } from '#chemistry/rounding.ts';
import type { AirFigures } from '#contracts/air.ts';
import { emptySheet, type CoatingSheet } from '#contracts/coatings.ts';

/** Sheets print ambient times for about this air where they do not say for which (common practice). */
const USUAL_CELSIUS = 20;

/** `flash`: solvent leaves a film; `air`: a film dries through by itself. */
export type Ambient = 'flash' | 'air';

/**
 * Whole minutes that a time set for the data sheet's usual air takes in this air. Air drying follows the sheet's own two
 * points, air dry and bake, and so may get shorter in warm air, down to the printed bake; all else has a single point and
 * follows 50 kJ/mol in the cold (from memory) and is never shorter than it is set: minutes are a minimum. The shop's own
 * factor for cold air counts where it asks for more than that; the one for damp air comes on top.
 */
export function minutesInAir(set: number, ambient: Ambient, sheet: CoatingSheet | null, air: AirFigures): number {
  if (set === 0) return 0;
  const { airDry, coldAir, dampAir, kilojoulesPerMole } = sheet ?? emptySheet;
  const points = pointsOf(set, ambient, sheet ?? emptySheet);
  const { minutes } = flashMinutes({
    printed: points,
    airCelsius: air.celsius,
    relativeHumidityPercent: air.humidity,
    kilojoulesPerMole: (ambient === 'air' ? kilojoulesPerMole : null) ?? DEFAULT_KILOJOULES_PER_MOLE,
  });
  const hasOwnPoints = points.length > 1 && airDry !== null;
  const cold = coldAir !== null && air.celsius < coldAir.belowCelsius ? set * coldAir.factor : 0;
  const least = Math.max(minutes, cold, hasOwnPoints ? 0 : set);
  return wholeMinutesUp(least * humidityFactor(air.humidity, dampAir ? [dampAir] : []).factor);
}

/** The air in which every time is at its shortest. */
const BEST_AIR: AirFigures = { celsius: 60, humidity: 0 };

/** The least that a time may be in any air. */
export const leastMinutes = (set: number, ambient: Ambient, sheet: CoatingSheet | null): number =>
  minutesInAir(set, ambient, sheet, BEST_AIR);

function pointsOf(set: number, ambient: Ambient, { airDry, bake }: CoatingSheet): PrintedPoint[] {
  const usual = { celsius: airDry?.celsius ?? USUAL_CELSIUS, minutes: set };
  const isFaster = airDry && bake && bake.celsius > airDry.celsius && bake.minutes < airDry.minutes;
  if (ambient === 'flash' || !isFaster) return [usual];
  // A shop that waits longer than its sheet says does so at each temperature.
  return [usual, { celsius: bake.celsius, minutes: (bake.minutes * set) / airDry.minutes }];
}
