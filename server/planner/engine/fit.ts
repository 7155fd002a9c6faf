import { endPaused, firstAfter, NEVER, nextFree, nextFreePaused, nextWithin } from './calendar.ts';
import { chooseLamps } from './fit-lamps.ts';
import { airClears } from './fit-air.ts';
import { placeClears } from './fit-place.ts';
import { HANDS, ONSITE, PAUSED, type Way } from './shop.ts';
import type { State } from './state.ts';

/** What is asked: one stage, one way, one place, one person. `stayFrom`: end of the previous stage where it stays, else -1. */
export type Ask = {
  stage: number;
  way: Way;
  place: number;
  person: number;
  stayFrom: number;
  /** Room that it takes in a rack. */
  units: number;
  /** Minutes that the place stays taken after the end. */
  settle: number;
  /** The place stays taken at least until this minute. */
  holdUntil: number;
  /** The next stage stays here. */
  goesOn: boolean;
};

/** The answer to an ask, reused: times per segment and lamps. */
export type Fit = {
  start: number;
  end: number;
  segFrom: Int32Array;
  segTo: Int32Array;
  lamps: Int32Array;
  /** True: pass over no minute, however a way pauses or waits; slower there. */
  careful: boolean;
  /** Where a stay clashed: the chain that it belongs to must begin at or after this minute; -1: no clash. */
  chainFrom: number;
};

export const makeFit = (segments: number, lamps: number): Fit => ({
  start: 0,
  end: 0,
  segFrom: new Int32Array(segments),
  segTo: new Int32Array(segments),
  lamps: new Int32Array(lamps),
  careful: false,
  chainFrom: -1,
});

/**
 * Lays the segments by calendar and person only, from `at` on. Returns the earliest start of all that fits, with the
 * times in `fit`, or NEVER.
 */
export function laySegments(state: State, way: Way, person: number, at: number, fit: Fit): number {
  const { shop } = state;
  let start = at;
  let k = 0;
  let now = start;
  while (k < way.segments) {
    const minutes = way.segMinutes[k]!;
    const need = way.segNeed[k]!;
    let from = now;
    if (need === HANDS) from = nextFree(shop.working[person]!, state.people[person]!, now, minutes);
    else if (need === PAUSED) from = nextFreePaused(shop.working[person]!, state.people[person]!, now, minutes);
    else if (need === ONSITE) from = nextWithin(shop.open, now, minutes);
    if (from >= NEVER) return NEVER;
    if (from > now) {
      const idle = from - now - (k > 0 ? way.segWait[k - 1]! : 0);
      if (k === 0) start = from;
      else if (idle > 0) {
        start += fit.careful && !way.rigid ? 1 : idle;
        now = start;
        k = 0;
        continue;
      }
    }
    fit.segFrom[k] = from;
    now =
      need === PAUSED
        ? endPaused(shop.working[person]!, firstAfter(shop.working[person]!, from), from, minutes)
        : from + minutes;
    fit.segTo[k] = now;
    k++;
  }
  fit.start = start;
  fit.end = now;
  return start;
}

/**
 * The earliest start from `at` on at which everything holds, with its end before `limit`. Fills `fit`; false: none.
 * Each obstacle moves the start to where that obstacle ends, so nothing feasible is passed over (ways with pauses or
 * waits may pass over a few minutes).
 */
export function fitFrom(state: State, ask: Ask, at: number, limit: number, fit: Fit): boolean {
  const { way } = ask;
  const { horizon } = state.shop;
  let start = at;
  fit.chainFrom = -1;
  for (;;) {
    start = laySegments(state, way, ask.person, start, fit);
    if (start >= NEVER || fit.end > horizon || fit.end >= limit) return false;
    let later = placeClears(state, ask, fit);
    if (fit.chainFrom >= 0) return false;
    if (later === 0 && (way.firstSpray >= 0 || way.lit.length > 0)) later = airClears(state, ask, fit);
    if (later === 0 && way.lampCount > 0) later = chooseLamps(state, ask, fit);
    if (later === 0) return true;
    if (later >= NEVER) return false;
    start += fit.careful && !way.rigid ? 1 : later;
  }
}
