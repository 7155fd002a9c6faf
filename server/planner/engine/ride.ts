import { settles } from './settles.ts';
import { type Placer, touch } from './placer.ts';
import { enter } from './state.ts';

/**
 * Puts a member's stage where the stage that leads its load stands. Returns the stage to place next, as for any other: an
 * earlier one of its own job that has to move later, or -1; then `wants` says when the leader would suit it.
 */
export function ride(p: Placer, s: number): number {
  const { shop, state } = p;
  const { at } = state;
  const way = p.wayOf[s]!;
  const lead = p.leadOf[s]!;
  const job = shop.jobs[shop.stageJob[s]!]!;
  const before = s > job.first;
  const from = Math.max(p.notBefore[s]!, before ? at.end[s - 1]! + way.gapMin : job.release);
  if (at.start[lead]! < from || at.end[lead]! < p.endAtLeast[s]!) {
    Object.assign(p.wants, { lead, start: from, end: p.endAtLeast[s]! });
    return -1;
  }
  const fixedBefore = before && shop.fixedAt[s - 1]! >= 0;
  if (fixedBefore && !way.stay && way.settle > 0 && !settles(p, s)) return -1;
  const latest = at.start[lead]! - way.gapMax;
  if (before && latest > at.end[s - 1]!) {
    if (fixedBefore) return -1;
    p.endAtLeast[s - 1] = latest;
    p.notBefore[s - 1] = at.start[s - 1]!;
    return s - 1;
  }
  follow(p, s, lead);
  return s + 1;
}

/** The leader's times, place, person and lamps. */
function follow(p: Placer, s: number, lead: number): void {
  const { shop, state } = p;
  const { at } = state;
  touch(p, s);
  at.place[s] = at.place[lead]!;
  at.person[s] = at.person[lead]!;
  at.start[s] = at.start[lead]!;
  at.end[s] = at.end[lead]!;
  at.holdFrom[s] = at.holdFrom[lead]!;
  at.holdTo[s] = at.holdTo[lead]!;
  at.units[s] = at.units[lead]!;
  at.goesOn[s] = at.goesOn[lead]!;
  const { maxSegments, maxLamps } = shop;
  for (let k = 0; k < maxSegments; k++) {
    at.segFrom[s * maxSegments + k] = at.segFrom[lead * maxSegments + k]!;
    at.segTo[s * maxSegments + k] = at.segTo[lead * maxSegments + k]!;
  }
  for (let k = 0; k < maxLamps; k++) at.lamps[s * maxLamps + k] = at.lamps[lead * maxLamps + k]!;
  enter(state, s, p.wayOf[s]!);
}
