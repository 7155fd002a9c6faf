import { timeRatio } from '#chemistry/cure/arrhenius.ts';
import { energyBetween } from '#chemistry/cure/fit-activation-energy.ts';
import type { PrintedPoint, PrintedPoints } from '#chemistry/printed-points.ts';
import { temperature } from '#chemistry/quantity.ts';

/**
 * Minutes at a temperature from a sheet's points, coldest first (`orderPoints`). Exactly the printed time at a printed
 * temperature; Arrhenius between neighbours; colder than the coldest along its own slope; hotter than the hottest of several
 * points no shorter than that one, since a film that skins over too early traps its solvent. Hotter is never slower.
 */
export function minutesFromPoints(points: PrintedPoints, celsius: number, kilojoulesPerMole: number): number {
  temperature('airCelsius', celsius);
  const first = points[0];
  const second = points[1];
  if (second === undefined) return first.minutes * timeRatio(celsius, first.celsius, kilojoulesPerMole);

  let colder: PrintedPoint = first;
  let hotter: PrintedPoint = second;
  for (const point of points.slice(2)) {
    if (celsius <= hotter.celsius) break;
    [colder, hotter] = [hotter, point];
  }
  if (celsius >= hotter.celsius) return hotter.minutes;
  const energy = energyBetween(colder, hotter);
  return energy === 0 ? colder.minutes : colder.minutes * timeRatio(celsius, colder.celsius, energy);
}
