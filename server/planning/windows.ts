import type { Way } from '#contracts/sheets.ts';

const MINUTE = 60_000;
const after = (instant: Date, minutes: number): Date => new Date(instant.getTime() + minutes * MINUTE);

/** Earliest and latest start that the chemistry leaves; null: no limit. */
export type Window = { earliest: Date | null; latest: Date | null };
export const NO_WINDOW: Window = { earliest: null, latest: null };

/**
 * The window of a stage, given where the stage before it ends (null: first of its job, or not booked yet). With a chosen
 * way it is that way's gap; without one, whatever any of the ways would allow.
 */
export function windowOf(previousEnd: Date | null, ways: readonly Pick<Way, 'id' | 'gap'>[], chosen?: string): Window {
  if (previousEnd === null) return NO_WINDOW;
  const picked = ways.filter((way) => way.id === chosen);
  const gaps = (picked.length > 0 ? picked : ways).map((way) => way.gap);
  if (gaps.length === 0) return NO_WINDOW;
  const most = gaps.map((gap) => gap.max);
  return {
    earliest: after(previousEnd, Math.min(...gaps.map((gap) => gap.min))),
    latest: most.includes(null) ? null : after(previousEnd, Math.max(...most.map((max) => max ?? 0))),
  };
}

/** The stage after one, as far as the hold on the place depends on it. */
export type Following = { way: Pick<Way, 'stay' | 'gap'>; from: Date };

/**
 * Until when a place stays taken by a stage (planning rule 3): for the next stage's settling time, or, where the next
 * stage is done on the spot, until that begins, which then holds the place itself.
 */
export function heldTo(end: Date, next: Following | null): Date {
  if (next === null) return end;
  if (next.way.stay) return next.from > end ? next.from : end;
  return after(end, next.way.gap.settle);
}
