import type { SheetGround, Way } from '#contracts/sheets.ts';
import type { SettledStage } from '../expand-sheet.ts';
import { needsHands, sprays } from '../way-times.ts';
import { inWay, type Found } from './found.ts';

/** What a way needs and the shop does not have: nobody with the skill, too few lamps, no such place. */
export function groundFaults(stage: SettledStage, way: Way, ground: SheetGround): Found[] {
  const at = inWay(stage, way);
  const skill = ground.skills.find((one) => one.skill === way.skill);
  const able = sprays(way) ? (skill?.trained ?? 0) : (skill?.people ?? 0);
  const there = new Set(ground.places.map(({ kind }) => kind));
  return [
    ...(way.skill !== null && needsHands(way) && able === 0
      ? [at.warn('skill-nobody', 'skill', { names: [way.skill], figures: [skill?.people ?? 0] })]
      : []),
    ...(way.lampCount > ground.lamps
      ? [at.warn('lamps-too-few', 'lamps', { figures: [way.lampCount, ground.lamps] })]
      : []),
    ...(!way.stay && way.placeKinds.length > 0 && !way.placeKinds.some((kind) => there.has(kind))
      ? [at.warn('place-kind-missing', 'places', { names: way.placeKinds })]
      : []),
  ];
}
