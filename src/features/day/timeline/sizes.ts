import type { Axis } from '../model/axis.ts';

/** Pixels: the column of row names. */
export const NAMES = 172;

/** Pixels: the hours above the rows, with the days above them where there are several. */
export const headerOf = (axis: Axis): number => (axis.days.length > 1 ? 50 : 32);
