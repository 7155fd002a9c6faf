import { NEVER } from './calendar.ts';
import type { Ask, Fit } from './fit.ts';
import { PAUSED, type Way } from './shop.ts';
import type { State } from './state.ts';
import { firstReaching } from './track.ts';

/** Start of phase `k` in a fit. */
export const fitPhaseFrom = (way: Way, fit: Fit, k: number): number =>
  fit.segFrom[way.phaseSeg[k]!]! + way.phaseOffset[k]!;

/** End of phase `k` in a fit. */
export function fitPhaseTo(way: Way, fit: Fit, k: number): number {
  const seg = way.phaseSeg[k]!;
  return way.segNeed[seg] === PAUSED ? fit.segTo[seg]! : fitPhaseFrom(way, fit, k) + way.phaseMinutes[k]!;
}

/** A way with coats and lamps of its own, too close together. */
const meetsItself = (way: Way, fit: Fit, purge: number): boolean =>
  fitPhaseFrom(way, fit, way.firstSpray) < fitPhaseTo(way, fit, way.lit[way.lit.length - 1]!) &&
  fitPhaseFrom(way, fit, way.lit[0]!) < fitPhaseTo(way, fit, way.lastSpray) + purge;

/** Rule 12: minutes by which the start has to move so that spray and lamps do not meet in the place's zone, or 0. */
export function airClears(state: State, ask: Ask, fit: Fit): number {
  const { way } = ask;
  const { placeZone, purge } = state.shop;
  const zone = placeZone[ask.place]!;
  if (zone < 0) return 0;
  if (way.firstSpray >= 0 && way.lit.length > 0 && meetsItself(way, fit, purge)) return NEVER;
  if (way.firstSpray >= 0) {
    const from = fitPhaseFrom(way, fit, way.firstSpray);
    const to = fitPhaseTo(way, fit, way.lastSpray) + purge;
    const glow = state.glow[zone]!;
    for (let i = firstReaching(glow, from); i < glow.n && glow.from[i]! < to; i++)
      if (glow.to[i]! > from) return glow.to[i]! - from;
  }
  if (way.lit.length > 0) {
    const from = fitPhaseFrom(way, fit, way.lit[0]!);
    const to = fitPhaseTo(way, fit, way.lit[way.lit.length - 1]!);
    const mist = state.mist[zone]!;
    for (let i = firstReaching(mist, from - purge); i < mist.n && mist.from[i]! < to; i++)
      if (mist.to[i]! + purge > from) return mist.to[i]! + purge - from;
  }
  return 0;
}
