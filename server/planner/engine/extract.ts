import type { Assignment, Interval, Stage } from '../types.ts';
import type { Decoder } from './decode.ts';
import { phaseFrom, phaseTo } from './state.ts';

/** The placed stages as assignments, fixed ones as given. */
export function extractAssignments(d: Decoder): Assignment[] {
  const { problem } = d.shop;
  const stages = problem.jobs.flatMap((job) => job.stages);
  return stages.flatMap((stage, s) => {
    const fixed = d.shop.fixedAt[s]!;
    if (fixed >= 0) return [problem.fixed[fixed]!];
    return d.state.at.way[s] ? [assignmentOf(d, stage, s)] : [];
  });
}

function assignmentOf(d: Decoder, stage: Stage, s: number): Assignment {
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
    mode: stage.modes[shop.ways[s]!.indexOf(way)]!.id,
    place: places[at.place[s]!]!.id,
    person: way.hands ? people[at.person[s]!]!.id : null,
    lamps: Array.from({ length: way.lampCount }, (_, k) => lamps[at.lamps[s * shop.maxLamps + k]!]!.id),
    load: null,
    start: at.start[s]!,
    end: at.end[s]!,
    phases,
  };
}
