import type { Bar } from '#contracts/day.ts';

/** What is left when several stages run as one load: the latest of the earliest, the earliest of the latest. */
export function windowOf(members: readonly Pick<Bar, 'window'>[]): Bar['window'] {
  return {
    earliest: utmost(
      members.map((bar) => bar.window.earliest),
      1,
    ),
    latest: utmost(
      members.map((bar) => bar.window.latest),
      -1,
    ),
  };
}

/** The last (1) or first (-1) of the instants that are given; null where none is. */
const utmost = (instants: readonly (string | null)[], sign: 1 | -1): string | null =>
  instants.reduce((best, at) => {
    if (at === null) return best;
    return best === null || (Date.parse(at) - Date.parse(best)) * sign > 0 ? at : best;
  }, null);
