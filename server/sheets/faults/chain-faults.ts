import { LEAST_PURGE_MINUTES } from '#chemistry/purge/purge-minutes.ts';
import type { Coating } from '#contracts/coatings.ts';
import type { Way } from '#contracts/sheets.ts';
import type { SettledStage } from '../expand-sheet.ts';
import {
  flashBeforeOwnHeat,
  heats,
  minutesAfterLastCoat,
  minutesBeforeCoat,
  minutesBeforeHeat,
  sprays,
} from '../way-times.ts';
import { gapSourceFaults } from './coat-faults.ts';
import { coatingOf, inWay, type Found, type Variant } from './found.ts';

/** What is wrong between a stage and the one before it. */
export function chainFaults(variant: Variant): Found[] {
  return variant.stages.flatMap((stage, i) => {
    const previous = variant.stages[i - 1];
    return stage.ways.flatMap((way) => [
      ...stayFaults(stage, way, previous),
      ...ownHeatFaults(stage, way, coatingOf(stage, variant)),
      ...(previous ? windowFaults(stage, way) : []),
      ...(previous ? wetFaults(stage, way, previous, coatingOf(previous, variant)) : []),
    ]);
  });
}

/** A way that stays needs something before it that leaves the part where this may go on: a coat, a cure, another stay. */
function stayFaults(stage: SettledStage, way: Way, previous: SettledStage | undefined): Found[] {
  if (!way.stay) return [];
  const at = inWay(stage, way);
  if (!previous) return [at.stop('stay-first', 'places')];
  const leavesIt = previous.ways.some((before) => before.stay || sprays(before) || heats(before));
  if (!leavesIt && (heats(way) || sprays(way)))
    return [at.warn('stay-elsewhere', 'places', { names: [previous.title] })];
  return [];
}

/** A gap that can never be met: the stage would have to begin before it may. */
function windowFaults(stage: SettledStage, way: Way): Found[] {
  const { min, max, settle } = way.gap;
  const purgeFirst = heats(way) && !sprays(way) && !way.phases.some(({ kind }) => kind === 'purge');
  const needed = Math.max(min, settle, purgeFirst ? LEAST_PURGE_MINUTES : 0);
  return max !== null && max < needed
    ? [inWay(stage, way).stop('window-closed', 'gap', { figures: [max, needed] })]
    : [];
}

/** The coating of this very stage baked in the same way. */
function ownHeatFaults(stage: SettledStage, way: Way, coating: Coating | null): Found[] {
  const flash = flashBeforeOwnHeat(way);
  if (flash === null || coating === null || flash >= coating.sheet.flashBeforeHeat) return [];
  const figures = [flash, coating.sheet.flashBeforeHeat];
  return [inWay(stage, way).stop('bake-before-flash', 'phases', { names: [coating.name], figures })];
}

/** Heat or the next coat on what the stage before has sprayed, counted from the end of its last coat. */
function wetFaults(stage: SettledStage, way: Way, previous: SettledStage, coating: Coating | null): Found[] {
  const wet = previous.ways.filter(sprays);
  if (coating === null || wet.length === 0) return [];
  const at = inWay(stage, way);
  const { sheet, name } = coating;
  const soonest = Math.min(...wet.map(minutesAfterLastCoat)) + way.gap.min;
  const [coat, heat] = [minutesBeforeCoat(way), minutesBeforeHeat(way)];
  const faults = gapSourceFaults(stage, way, coating);
  if (heat !== null && (coat === null || heat < coat) && soonest + heat < sheet.flashBeforeHeat)
    faults.push(
      at.stop('bake-before-flash', 'gap', { names: [name], figures: [soonest + heat, sheet.flashBeforeHeat] }),
    );
  if (coat === null || (heat !== null && heat < coat)) return faults;
  if (soonest + coat < sheet.flashBeforeNext)
    faults.push(at.warn('recoat-early', 'gap', { names: [name], figures: [soonest + coat, sheet.flashBeforeNext] }));
  if (sheet.recoatWithin === null) return faults;
  if (way.gap.max === null)
    return [...faults, at.warn('no-window', 'gap', { names: [name], figures: [sheet.recoatWithin] })];
  // The window ends with the first coat, not with the set-up for it.
  const latest = Math.max(...wet.map(minutesAfterLastCoat)) + way.gap.max + coat;
  if (latest > sheet.recoatWithin)
    faults.push(at.warn('past-recoat', 'gap', { names: [name], figures: [latest, sheet.recoatWithin] }));
  return faults;
}
