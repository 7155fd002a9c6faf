import { firstAfter } from './calendar.ts';
import type { Ask, Fit } from './fit.ts';
import { fixedTogether } from './load-mates.ts';
import { BOOTH, RACK } from './shop.ts';
import type { State } from './state.ts';
import { firstEnding, firstReaching, type Track } from './track.ts';

/**
 * Rules 4, 6 and 7 for the place: 0 where it is free for the fit, else the minutes by which the start has to move.
 * A stay cannot move away from what stands in its place: then `fit.chainFrom` says from when the chain may begin.
 */
export function placeClears(state: State, ask: Ask, fit: Fit): number {
  const { shop } = state;
  const from = ask.stayFrom >= 0 ? ask.stayFrom : fit.start;
  const to = Math.max(fit.end + ask.settle, ask.holdUntil);
  const closed = shop.placeClosed[ask.place]!;
  let free = from;
  const c = firstAfter(closed, from);
  if (c < closed.n && closed.from[c]! < to) free = closed.to[c]!;
  const track = state.places[ask.place]!;
  if (track.n > 0) {
    const kind = shop.placeKind[ask.place]!;
    const clear = kind === RACK ? rackFrees(state, ask, track, from, to) : trackFrees(track, from, to);
    if (clear > free) free = clear;
    if (free === from && kind === BOOTH && shop.longestCleanup > 0)
      free = cleanFrees(state, ask, track, from, to, fit.start);
  }
  if (free <= from) return 0;
  if (ask.stayFrom < 0) return free - from;
  fit.chainFrom = free;
  return free - from;
}

/** The end of the use that overlaps, or 0. */
function trackFrees(track: Track, from: number, to: number): number {
  const i = firstEnding(track, from);
  return i < track.n && track.from[i]! < to ? track.to[i]! : 0;
}

/** The first end of an overlapping use where the rack would be too full, or 0. */
function rackFrees(state: State, ask: Ask, track: Track, from: number, to: number): number {
  const room = state.shop.placeUnits[ask.place]! - ask.units;
  const begin = firstReaching(track, from);
  let first = 0;
  let together = 0;
  for (let i = begin; i < track.n && track.from[i]! < to; i++) {
    if (track.to[i]! <= from) continue;
    together += track.a[i]!;
    if (first === 0 || track.to[i]! < first) first = track.to[i]!;
  }
  if (together <= room + 1e-9) return 0; // all at once would fit: the usual case
  for (let i = begin; i < track.n && track.from[i]! < to; i++) {
    if (track.to[i]! <= from) continue;
    const minute = Math.max(from, track.from[i]!);
    let sum = 0;
    for (let j = begin; j < track.n && track.from[j]! <= minute; j++) if (track.to[j]! > minute) sum += track.a[j]!;
    if (sum > room + 1e-9) return first;
  }
  return 0;
}

/** Rule 6: minutes of clean-up after earlier loads and before later ones. Returns where the hold may begin, or `from`. */
function cleanFrees(state: State, ask: Ask, track: Track, from: number, to: number, start: number): number {
  const { cleanup, families, longestCleanup } = state.shop;
  const family = ask.way.family;
  if (family < 0) return from;
  const next = firstEnding(track, from);
  for (let i = next - 1; i >= 0 && track.to[i]! + longestCleanup > start; i--) {
    const other = track.a[i]!;
    if (other < 0 || (track.b[i]! & 1) === 1) continue;
    const own = isPrevious(state, ask.stage, track.b[i]! >> 1);
    if (own && ask.stayFrom >= 0) continue; // where it stays, what stood there is its own previous stage
    const clean = track.to[i]! + (own ? settleBefore(state, ask) : 0) + cleanup[other * families + family]!;
    if (clean > start) return Math.max(clean, from + 1);
  }
  if (ask.goesOn) return from;
  for (let i = next; i < track.n && track.from[i]! < to + longestCleanup; i++) {
    const other = track.a[i]!;
    if (other < 0) continue;
    if (track.from[i]! < to + cleanup[family * families + other]!) return track.to[i]!;
  }
  return from;
}

/** Whether `other` is the stage before, or was fixed in one load with it. */
function isPrevious({ shop }: State, stage: number, other: number): boolean {
  if (stage === shop.jobs[shop.stageJob[stage]!]!.first) return false;
  return other === stage - 1 || (shop.fixedAt[stage - 1]! >= 0 && fixedTogether(shop, other, stage - 1));
}

/** A fixed stage's use does not know yet for how long it has to settle before this one. */
const settleBefore = ({ shop }: State, { stage, way }: Ask): number => (shop.fixedAt[stage - 1]! >= 0 ? way.settle : 0);
