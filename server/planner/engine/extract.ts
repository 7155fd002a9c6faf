import type { Assignment, Interval, Stage } from '../types.ts';
import type { Decoder } from './decode.ts';
import { leaderOf } from './ring.ts';
import { ALONE } from './shop.ts';
import { phaseFrom, phaseTo } from './state.ts';

/** The placed stages as assignments, fixed ones as given. */
export function extractAssignments(d: Decoder): Assignment[] {
  const { problem } = d.shop;
  const stages = problem.jobs.flatMap((job) => job.stages);
  const taken = new Set(problem.fixed.map((f) => f.load));
  return stages.flatMap((stage, s) => {
    const fixed = d.shop.fixedAt[s]!;
    if (fixed >= 0) return [problem.fixed[fixed]!];
    return d.state.at.way[s] ? [assignmentOf(d, stage, s, taken)] : [];
  });
}

function assignmentOf(d: Decoder, stage: Stage, s: number, taken: ReadonlySet<string | null>): Assignment {
  const { shop, state } = d;
  const { at } = state;
  const way = at.way[s]!;
  const { places, people, lamps } = shop.problem;
  const phases = Array.from(way.phaseMinutes, (_, k): Interval => [
    phaseFrom(state, s, way, k),
    phaseTo(state, s, way, k),
  ]);
  return {
    stage: stage.id,
    mode: way.mode.id,
    place: places[at.place[s]!]!.id,
    person: way.hands ? people[at.person[s]!]!.id : null,
    lamps: Array.from({ length: way.lampCount }, (_, k) => lamps[at.lamps[s * shop.maxLamps + k]!]!.id),
    load: way.share === ALONE ? null : loadKey(d, s, taken),
    start: at.start[s]!,
    end: at.end[s]!,
    phases,
  };
}

/** Named after the stage that leads; another name where something fixed has that one. */
function loadKey(d: Decoder, s: number, taken: ReadonlySet<string | null>): string {
  const { shop, ring, state } = d;
  const firstShared = (id: number): number => {
    let k = shop.blocks[id]!.first;
    while (state.at.way[k]!.share === ALONE) k++;
    return k;
  };
  const block = shop.blockOf[s]!;
  let key = `load ${shop.stageIds[firstShared(leaderOf(ring, block)) + s - firstShared(block)]!}`;
  while (taken.has(key)) key += '+';
  return key;
}
