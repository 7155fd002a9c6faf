import type { Mode } from '#planner/types.ts';

const APART = '@';

/**
 * A way is one mode of the planner's, unless its places lie in air so different that its flashes last differently: then it is
 * one mode for each length, `spray`, `spray@2`, ...
 */
export const modeId = (way: string, group: number): string => (group === 0 ? way : `${way}${APART}${group + 1}`);

/** The way behind a mode's id. */
export const wayOfMode = (id: string): string => id.split(APART, 1)[0] ?? id;

/** The mode of a way that is offered at a place. */
export const modeAt = (modes: readonly Mode[], way: string, placeId: string): string | undefined =>
  modes.find((mode) => wayOfMode(mode.id) === way && mode.places.includes(placeId))?.id;
