import { type Calendar, firstAfter, NEVER } from './calendar.ts';
import { fitPhaseFrom, fitPhaseTo } from './fit-air.ts';
import type { Ask, Fit } from './fit.ts';
import { HANDS, NONE, ONSITE, PAUSED, RACK } from './shop.ts';
import type { State } from './state.ts';
import { firstFrom, type Track } from './track.ts';

/**
 * By how many minutes a fit may start later with certainty, all its times moving along; 0 or more. Where that ends, the
 * answer may be yes again, so ask anew.
 */
export function slackOf(state: State, ask: Ask, fit: Fit): number {
  return Math.min(
    peopleSlack(state, ask, fit),
    placeSlack(state, ask, fit),
    airSlack(state, ask, fit),
    lampSlack(state, ask, fit),
  );
}

/** Until the interval that `at` (an end: exclusive) lies in is over. */
function untilOver(c: Calendar, from: number, to: number): number {
  const i = firstAfter(c, from);
  return i < c.n ? Math.max(0, c.to[i]! - to) : 0;
}

/** Until the next use that starts at or after `to`, or earlier where uses may overlap: none of them may be met. */
const untilNext = (t: Track, from: number, to: number): number => {
  const i = firstFrom(t, from);
  return i < t.n ? Math.max(0, t.from[i]! - to) : NEVER;
};

function peopleSlack(state: State, { way, person }: Ask, fit: Fit): number {
  let least = NEVER;
  for (let k = 0; k < way.segments; k++) {
    const from = fit.segFrom[k]!;
    const to = fit.segTo[k]!;
    const need = way.segNeed[k]!;
    // A wait in use shrinks first: then the next layout has other times.
    if (k > 0 && from > fit.segTo[k - 1]!) return 0;
    if (need === NONE) continue;
    if (need === ONSITE) least = Math.min(least, untilOver(state.shop.open, from, to));
    if (need === HANDS || need === PAUSED) {
      const shift = state.shop.working[person]!;
      least = Math.min(least, untilNext(state.people[person]!, to, to));
      least = Math.min(least, need === HANDS ? untilOver(shift, from, to) : pausedSlack(shift, from, to));
    }
  }
  return least;
}

/** A paused segment moves along while neither its start nor its end leaves the interval it lies in. */
const pausedSlack = (shift: Calendar, from: number, to: number): number =>
  Math.min(untilOver(shift, from, from + 1), untilOver(shift, to - 1, to));

function placeSlack(state: State, ask: Ask, fit: Fit): number {
  const { shop } = state;
  const to = Math.max(fit.end + ask.settle, ask.holdUntil);
  // Until the end of the hold moves, the place has nothing to say.
  const still = to - (fit.end + ask.settle);
  const closed = shop.placeClosed[ask.place]!;
  const c = firstAfter(closed, fit.start);
  const toClosed = c < closed.n ? Math.max(0, closed.from[c]! - to) : NEVER;
  const track = state.places[ask.place]!;
  // Starts of other uses within reach may fill a rack or ask for clean-up: up to there nothing changes.
  const apart = shop.placeKind[ask.place] === RACK ? 0 : ask.goesOn ? 0 : shop.longestCleanup;
  const i = firstFrom(track, shop.placeKind[ask.place] === RACK ? fit.start : to);
  let next = i < track.n ? Math.max(0, track.from[i]! - to - apart) : NEVER;
  if (shop.placeKind[ask.place] === RACK && i < track.n) next = Math.max(0, nextStart(track, to) - to);
  return still + Math.min(toClosed, next);
}

function nextStart(track: Track, at: number): number {
  const i = firstFrom(track, at);
  return i < track.n ? track.from[i]! : NEVER;
}

function airSlack(state: State, { way, place }: Ask, fit: Fit): number {
  const { placeZone, purge } = state.shop;
  const zone = placeZone[place]!;
  if (zone < 0) return NEVER;
  let least = NEVER;
  if (way.firstSpray >= 0) {
    const to = fitPhaseTo(way, fit, way.lastSpray) + purge;
    least = Math.min(least, nextStart(state.glow[zone]!, fitPhaseFrom(way, fit, way.firstSpray)) - to);
  }
  if (way.lit.length > 0) {
    const from = fitPhaseFrom(way, fit, way.lit[0]!);
    least = Math.min(least, nextStart(state.mist[zone]!, from) - fitPhaseTo(way, fit, way.lit[way.lit.length - 1]!));
  }
  return Math.max(0, least);
}

/** Until anything happens to the lamps chosen or on their circuits. */
function lampSlack(state: State, { way, place }: Ask, fit: Fit): number {
  if (way.lit.length === 0) return NEVER;
  const { lampMove, lampClosed, lampCircuit } = state.shop;
  const from = fitPhaseFrom(way, fit, way.lit[0]!);
  const to = fitPhaseTo(way, fit, way.lit[way.lit.length - 1]!);
  let least = NEVER;
  for (let k = 0; k < way.lampCount; k++) {
    const lamp = fit.lamps[k]!;
    const closed = lampClosed[lamp]!;
    const c = firstAfter(closed, from);
    if (c < closed.n) least = Math.min(least, closed.from[c]! - to);
    const uses = state.lamps[lamp]!;
    const i = firstFrom(uses, from);
    if (i < uses.n) least = Math.min(least, uses.from[i]! - (uses.a[i] === place ? 0 : lampMove) - to);
    for (const phase of way.lit) {
      const end = fitPhaseTo(way, fit, phase);
      least = Math.min(least, nextStart(state.circuits[lampCircuit[lamp]!]!, end) - end);
    }
  }
  return Math.max(0, least);
}
