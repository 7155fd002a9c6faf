import type { Assignment, Interval, Mode, Problem } from '#planner/types.ts';
import { phasesWhere } from './free-hands.ts';
import type { Judged } from './judge.ts';
import { ELSEWHERE } from './problem/fixed.ts';
import { personOf } from './problem/roster.ts';

/** Time in which a stage has a place, a lamp or a pair of hands to itself (with its load). */
export type OccupancyRow = {
  stageId: string;
  resource: 'place' | 'lamp' | 'person';
  resourceId: string;
  loadId: string;
  from: Date;
  to: Date;
};

type Draft = Omit<OccupancyRow, 'from' | 'to'> & { from: number; to: number };

/**
 * What a judged plan takes from `now` on. Places are held while parts settle or until the stage that is done on the spot;
 * racks are counted by the planner and not kept here. Where two loads meet because reality broke the plan, the earlier one
 * yields: what is written never clashes.
 */
export function occupancyRows(
  { built, plan }: Judged,
  now: Date,
  loadIdOf: (stageId: string) => string,
): OccupancyRow[] {
  const { problem, clock } = built;
  const modes = new Map(problem.jobs.flatMap((job) => job.stages.map(({ id, modes: [mode] }) => [id, mode] as const)));
  const ends = holdEnds(problem, plan.assignments, modes);
  const drafts = plan.assignments.flatMap((at) =>
    takenBy(problem, at, modes.get(at.stage), ends.get(at.stage) ?? at.end).map((row) => ({
      ...row,
      loadId: loadIdOf(at.stage),
    })),
  );
  return yielding(drafts).flatMap(({ from, to, ...row }) => {
    const span = { from: clock.instant(from), to: clock.instant(to) };
    if (span.to <= now) return [];
    return [{ ...row, from: span.from < now ? now : span.from, to: span.to }];
  });
}

/** Planning rule 3, member by member of a load. */
function holdEnds(
  problem: Problem,
  assignments: readonly Assignment[],
  modes: ReadonlyMap<string, Mode | undefined>,
): Map<string, number> {
  const placed = new Map(assignments.map((at) => [at.stage, at]));
  const ends = new Map<string, number>();
  for (const { stages } of problem.jobs)
    stages.forEach(({ id }, i) => {
      const at = placed.get(id);
      const next = placed.get(stages[i + 1]?.id ?? '');
      const mode = next && modes.get(next.stage);
      if (!at) return;
      const settled = mode ? (mode.stay ? next.start : at.end + mode.gap.settle) : at.end;
      ends.set(id, Math.max(at.end, settled));
    });
  return ends;
}

function takenBy(problem: Problem, at: Assignment, mode: Mode | undefined, heldTo: number): Omit<Draft, 'loadId'>[] {
  const rows: Omit<Draft, 'loadId'>[] = [];
  const take = (resource: Draft['resource'], resourceId: string, [from, to]: Interval): void => {
    if (to > from) rows.push({ stageId: at.stage, resource, resourceId, from, to });
  };
  const kind = problem.places.find(({ id }) => id === at.place)?.kind;
  if (kind !== 'rack' && at.place !== ELSEWHERE) take('place', at.place, [at.start, heldTo]);
  const lit = phasesWhere(mode, at.phases, ({ lamp }) => lamp === true);
  const [first, last] = [lit[0], lit.at(-1)];
  if (first && last) for (const lamp of at.lamps) take('lamp', lamp, [first[0], last[1]]);
  if (at.person === null) return rows;
  const working = problem.people.find(({ id }) => id === at.person)?.working ?? [];
  for (const span of phasesWhere(mode, at.phases, ({ attendance }) => attendance === 'hands')) {
    // Paused work only takes the hours in which somebody works.
    const parts = mode?.split
      ? working.map(([s, e]): Interval => [Math.max(s, span[0]), Math.min(e, span[1])])
      : [span];
    for (const part of parts) take('person', personOf(at.person), part);
  }
  return rows;
}

function yielding(rows: readonly Draft[]): Draft[] {
  const kept: Draft[] = [];
  for (const row of [...rows].sort((a, b) => a.from - b.from || a.to - b.to)) {
    for (const earlier of kept)
      if (earlier.resourceId === row.resourceId && earlier.loadId !== row.loadId && earlier.to > row.from)
        earlier.to = row.from;
    kept.push({ ...row });
  }
  return kept.filter(({ from, to }) => to > from);
}
