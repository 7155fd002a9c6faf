import type { Coating } from '#contracts/coatings.ts';
import type { Way } from '#contracts/sheets.ts';
import { gapFromSheet } from '#chemistry/sheets/gap-from-sheet.ts';
import { minutesFromSheet } from '#chemistry/sheets/minutes-from-sheet.ts';
import { potLifeVerdict } from '#chemistry/windows/pot-life.ts';
import type { SettledStage } from '../expand-sheet.ts';
import { coatsOf, minutesOf, minutesOfMix, pausesBetween } from '../way-times.ts';
import { inWay, type Found } from './found.ts';

/** A way against the data sheet of the coating it sprays, or that it cures. */
export function coatFaults(stage: SettledStage, way: Way, coating: Coating): Found[] {
  const { sheet, name } = coating;
  const at = inWay(stage, way);
  const coats = coatsOf(way);
  // A pause that says it comes from the sheet is told of by `sheet-differs`.
  const own = pausesBetween(way).filter((pause) => pause.every(({ source }) => source !== 'flash-between'));
  const shortest = Math.min(...own.map(minutesOf));
  const { from, to } = sheet.coats;
  const mix = minutesOfMix(way);
  return [
    ...(coats > 0 && (coats < from || coats > to)
      ? [at.warn('coats-off-sheet', 'phases', { names: [name], figures: [coats, from, to] })]
      : []),
    ...(shortest < sheet.flashBetweenCoats
      ? [at.warn('flash-short', 'phases', { names: [name], figures: [shortest, sheet.flashBetweenCoats] })]
      : []),
    ...(coats > 0 && outlives(mix, sheet.potLife)
      ? [at.warn('pot-life', 'phases', { names: [name], figures: [mix, sheet.potLife ?? 0] })]
      : []),
  ];
}

/** May the last coat still begin: 44 min after mixing at a pot life of 45 yes, 46 min no. */
const outlives = (mix: number, potLife: number | null): boolean =>
  potLife !== null && potLifeVerdict({ mixedMs: 0, potLifeMinutes: potLife }, mix * 60_000).code === 'expired';

/** Phases whose minutes are said to come from the data sheet and are not what it says now. */
export function sourceFaults(stage: SettledStage, way: Way, coating: Coating): Found[] {
  const at = inWay(stage, way);
  return way.phases.flatMap(({ source, minutes }) => {
    const says = source === undefined ? null : minutesFromSheet(source, coating.sheet);
    if (says === null || says === minutes) return [];
    return [at.warn('sheet-differs', 'phases', { names: [coating.name], figures: [minutes, says] })];
  });
}

/** The same of a gap, by the data sheet of the coating below. */
export function gapSourceFaults(stage: SettledStage, way: Way, below: Coating): Found[] {
  const says = gapFromSheet(way.gap, below.sheet);
  if (says === way.gap) return [];
  const figures = says.min === way.gap.min ? [way.gap.max ?? 0, says.max ?? 0] : [way.gap.min, says.min];
  return [inWay(stage, way).warn('sheet-differs', 'gap', { names: [below.name], figures })];
}
