import { firstAfter, NEVER } from './calendar.ts';
import { fitPhaseFrom, fitPhaseTo } from './fit-air.ts';
import type { Ask, Fit } from './fit.ts';
import type { State } from './state.ts';
import { firstReaching } from './track.ts';

/**
 * Rules 7, 10 and 11: picks the lamps. Lamps that are free the whole time are taken, the least kilowatts first, as far
 * as their circuits carry them. 0 where there are enough; else the least minutes after which another lamp or kilowatt
 * comes free; NEVER where none ever does.
 */
export function chooseLamps(state: State, ask: Ask, fit: Fit): number {
  const { shop } = state;
  const { way } = ask;
  if (way.lit.length === 0) {
    for (let k = 0; k < way.lampCount; k++) fit.lamps[k] = way.lamps[k]!;
    return 0;
  }
  const from = fitPhaseFrom(way, fit, way.lit[0]!);
  const to = fitPhaseTo(way, fit, way.lit[way.lit.length - 1]!);
  let later = NEVER;
  let chosen = 0;
  for (let k = 0; k < way.lamps.length && chosen < way.lampCount; k++) {
    const lamp = way.lamps[k]!;
    const busy = lampFrees(state, lamp, ask.place, from, to);
    if (busy > 0) {
      if (busy - from < later) later = busy - from;
      continue;
    }
    let own = shop.lampKw[lamp]!;
    for (let c = 0; c < chosen; c++) {
      const other = fit.lamps[c]!;
      if (shop.lampCircuit[other] === shop.lampCircuit[lamp]) own += shop.lampKw[other]!;
    }
    const wait = circuitFrees(state, shop.lampCircuit[lamp]!, own, ask, fit);
    if (wait === 0) fit.lamps[chosen++] = lamp;
    else if (wait < later) later = wait;
  }
  return chosen === way.lampCount ? 0 : later;
}

/** 0 where the lamp is free in the window, else when it will be. */
function lampFrees(state: State, lamp: number, place: number, from: number, to: number): number {
  const { lampClosed, lampMove } = state.shop;
  const closed = lampClosed[lamp]!;
  const c = firstAfter(closed, from);
  if (c < closed.n && closed.from[c]! < to) return closed.to[c]!;
  const track = state.lamps[lamp]!;
  for (let i = firstReaching(track, from - lampMove); i < track.n && track.from[i]! < to + lampMove; i++) {
    const move = track.a[i] === place ? 0 : lampMove;
    if (track.from[i]! < to + move && track.to[i]! + move > from) return track.to[i]! + move;
  }
  return 0;
}

/** 0 where the circuit carries `kw` more in every lit phase, else the least minutes until something on it goes off. */
function circuitFrees(state: State, circuit: number, kw: number, ask: Ask, fit: Fit): number {
  const track = state.circuits[circuit]!;
  const room = state.shop.circuitKw[circuit]! - kw + 1e-9;
  if (room < 0) return NEVER;
  let later = NEVER;
  let full = false;
  for (const phase of ask.way.lit) {
    const from = fitPhaseFrom(ask.way, fit, phase);
    const to = fitPhaseTo(ask.way, fit, phase);
    const begin = firstReaching(track, from);
    for (let i = begin; i < track.n && track.from[i]! < to; i++) {
      if (track.to[i]! <= from) continue;
      later = Math.min(later, track.to[i]! - from);
      const minute = Math.max(from, track.from[i]!);
      let sum = 0;
      for (let j = begin; j < track.n && track.from[j]! <= minute; j++) if (track.to[j]! > minute) sum += track.a[j]!;
      if (sum > room) full = true;
    }
  }
  return full ? later : 0;
}
