import { LEAST_PURGE_MINUTES } from '#chemistry/purge/purge-minutes.ts';
import type { Way } from '#contracts/sheets.ts';
import type { SettledStage } from '../expand-sheet.ts';
import { flashBeforeOwnHeat, heats, isHeat, minutesOf, needsHands, sprays } from '../way-times.ts';
import { inWay, type Found } from './found.ts';

/** What is wrong with a way by itself, whatever comes before it. */
export function wayFaults(stage: SettledStage, way: Way): Found[] {
  const at = inWay(stage, way);
  const lit = way.phases.some(({ lamp }) => lamp === true);
  const onlyRack = way.placeKinds.length > 0 && way.placeKinds.every((kind) => kind === 'rack');
  return [
    ...(!way.stay && way.placeKinds.length === 0 ? [at.stop('no-place', 'places')] : []),
    ...(!way.stay && onlyRack && sprays(way) ? [at.stop('spray-on-rack', 'places')] : []),
    ...(lit && way.lampCount === 0 ? [at.stop('lamp-no-lamps', 'lamps')] : []),
    ...(!lit && way.lampCount > 0 ? [at.warn('lamps-never-lit', 'lamps', { figures: [way.lampCount] })] : []),
    ...(needsHands(way) && way.skill === null ? [at.warn('hands-no-skill', 'skill')] : []),
    // Without a temperature no limit of part, booth or vehicle can be held against it.
    ...(heats(way) && way.bakeCelsius === null ? [at.stop('heat-no-temperature', 'heat')] : []),
    ...purgeFault(stage, way),
  ];
}

/**
 * Heat needs air let through first: at least 3 min (International Fire Code 2018, ch. 24; 29 CFR 1910.107(j)(4)). Where the
 * sheet leaves room, the planner stretches purge or wait to what the place asks; where it leaves none, the way is never offered.
 */
function purgeFault(stage: SettledStage, way: Way): Found[] {
  const heat = way.phases.findIndex(isHeat);
  if (heat < 0) return [];
  const at = inWay(stage, way);
  const purge = minutesOf(way.phases.slice(0, heat).filter(({ kind }) => kind === 'purge'));
  const flash = flashBeforeOwnHeat(way);
  const hasPurge = way.phases.slice(0, heat).some(({ kind }) => kind === 'purge');
  const have = hasPurge ? purge : (flash ?? way.gap.min);
  if (have >= LEAST_PURGE_MINUTES) return [];
  const more = { figures: [have, LEAST_PURGE_MINUTES] };
  if (hasPurge) return [at.warn('no-purge', 'phases', more)];
  const room = flash === null ? way.gap.max === null || way.gap.max >= LEAST_PURGE_MINUTES : flash > 0;
  return [room ? at.warn('no-purge', 'phases', more) : at.stop('no-purge', 'phases', more)];
}
