import type { Phase, Way } from '#contracts/sheets.ts';

export const minutesOf = (phases: readonly Pick<Phase, 'minutes'>[]): number =>
  phases.reduce((sum, { minutes }) => sum + minutes, 0);

/** Booth air or a lamp: the part gets hot. */
export const isHeat = (phase: Phase): boolean => phase.kind === 'bake' || phase.lamp === true;
const isSpray = (phase: Phase): boolean => phase.kind === 'spray';

export const sprays = (way: Pick<Way, 'phases'>): boolean => way.phases.some(isSpray);
export const heats = (way: Pick<Way, 'phases'>): boolean => way.phases.some(isHeat);
export const needsHands = (way: Pick<Way, 'phases'>): boolean =>
  way.phases.some(({ attendance }) => attendance === 'hands');
export const coatsOf = (way: Pick<Way, 'phases'>): number => way.phases.filter(isSpray).length;

/** Minutes of heat by the sheet; none where no temperature is given. */
export const heatMinutesOf = (way: Pick<Way, 'phases' | 'bakeCelsius'>): number =>
  way.bakeCelsius === null ? 0 : minutesOf(way.phases.filter(isHeat));

/** From the end of the last coat to the end of the way. */
export const minutesAfterLastCoat = (way: Pick<Way, 'phases'>): number =>
  minutesOf(way.phases.slice(way.phases.findLastIndex(isSpray) + 1));

/** From the start of the first coat to the start of the last: what the mixed product has to last. */
export function minutesOfMix(way: Pick<Way, 'phases'>): number {
  const first = way.phases.findIndex(isSpray);
  return first < 0 ? 0 : minutesOf(way.phases.slice(first, way.phases.findLastIndex(isSpray)));
}

/** Minutes before the first coat, and before the first heat; null where there is none. */
export const minutesBeforeCoat = (way: Pick<Way, 'phases'>): number | null => before(way.phases, isSpray);
export const minutesBeforeHeat = (way: Pick<Way, 'phases'>): number | null => before(way.phases, isHeat);

function before(phases: readonly Phase[], wanted: (phase: Phase) => boolean): number | null {
  const index = phases.findIndex(wanted);
  return index < 0 ? null : minutesOf(phases.slice(0, index));
}

/** The pauses between the coats, with the phases that make them. */
export function pausesBetween(way: Pick<Way, 'phases'>): Phase[][] {
  const coats = way.phases.flatMap((phase, i) => (isSpray(phase) ? [i] : []));
  return coats.slice(1).map((coat, i) => way.phases.slice((coats[i] ?? 0) + 1, coat));
}

/** From the last coat to heat in one and the same way; null where it does not heat what it sprays. */
export function flashBeforeOwnHeat(way: Pick<Way, 'phases'>): number | null {
  const heat = way.phases.findIndex(isHeat);
  if (heat < 0) return null;
  const coat = way.phases.slice(0, heat).findLastIndex(isSpray);
  return coat < 0 ? null : minutesOf(way.phases.slice(coat + 1, heat));
}
