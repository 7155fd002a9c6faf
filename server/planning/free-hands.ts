import type { Assignment, Interval, Mode, Problem } from '#planner/types.ts';

/** What others do at a time, so that hands and lamps can be chosen that are free. The rules have the last word. */
export type Others = {
  problem: Problem;
  assignments: readonly Assignment[];
  modeOf: (at: Assignment) => Mode | undefined;
};

const meet = ([a, b]: Interval, [c, d]: Interval): boolean => a < d && c < b;

/** Spans of those phases that a condition picks. */
export const phasesWhere = (
  mode: Mode | undefined,
  phases: readonly Interval[],
  wanted: (phase: Mode['phases'][number]) => boolean,
): Interval[] => phases.filter((_, k) => mode?.phases[k] !== undefined && wanted(mode.phases[k]));

/** True where the person works in all hands-on phases (a pause allowed in split work) and does nothing else then. */
export function isFree(
  { problem, assignments, modeOf }: Others,
  personId: string,
  mode: Mode,
  phases: readonly Interval[],
): boolean {
  const working = problem.people.find(({ id }) => id === personId)?.working ?? [];
  const mine = phasesWhere(mode, phases, ({ attendance }) => attendance === 'hands');
  const there = mine.every(([from, to]) => mode.split || working.some(([s, e]) => s <= from && to <= e));
  const parts = mode.split ? mine.flatMap((span) => within(span, working)) : mine;
  return (
    there &&
    !assignments.some((other) => {
      if (other.person !== personId) return false;
      const theirs = phasesWhere(modeOf(other), other.phases, ({ attendance }) => attendance === 'hands');
      const busy = modeOf(other)?.split ? theirs.flatMap((span) => within(span, working)) : theirs;
      return busy.some((span) => parts.some((part) => meet(span, part)));
    })
  );
}

const within = ([from, to]: Interval, hours: readonly Interval[]): Interval[] =>
  hours.map(([s, e]): Interval => [Math.max(s, from), Math.min(e, to)]).filter(([s, e]) => s < e);

/** Lamps for a stage: those it has where they will do, else the first that are free and that their circuits carry; null: none. */
export function freeLamps(
  others: Others,
  mode: Mode,
  placeId: string,
  phases: readonly Interval[],
  has: readonly string[],
): string[] | null {
  if (mode.lampCount === 0) return [];
  const lit = litSpan(mode, phases);
  if (!lit) return null;
  const order = [...has.filter((id) => mode.lamps.includes(id)), ...mode.lamps.filter((id) => !has.includes(id))];
  const load = circuitLoads(others, lit);
  const chosen: string[] = [];
  for (const id of order) {
    if (chosen.length === mode.lampCount) break;
    const lamp = others.problem.lamps.find((candidate) => candidate.id === id);
    if (!lamp || lamp.closed.some((span) => meet(span, lit)) || isLampBusy(others, id, placeId, lit)) continue;
    const drawn = (load.get(lamp.circuit) ?? 0) + lamp.kw;
    const limit = others.problem.circuits.find((circuit) => circuit.id === lamp.circuit)?.kw ?? 0;
    if (drawn > limit + 1e-9) continue;
    load.set(lamp.circuit, drawn);
    chosen.push(id);
  }
  return chosen.length === mode.lampCount ? chosen.sort() : null;
}

function litSpan(mode: Mode | undefined, phases: readonly Interval[]): Interval | null {
  const lit = phasesWhere(mode, phases, ({ lamp }) => lamp === true);
  const first = lit[0];
  const last = lit.at(-1);
  return first && last ? [first[0], last[1]] : null;
}

function isLampBusy({ problem, assignments, modeOf }: Others, lampId: string, placeId: string, lit: Interval): boolean {
  return assignments.some((other) => {
    const use = other.lamps.includes(lampId) ? litSpan(modeOf(other), other.phases) : null;
    const move = other.place === placeId ? 0 : problem.lampMove;
    return use !== null && meet([use[0] - move, use[1] + move], lit);
  });
}

/** Kilowatts drawn by others at any time in the span, added up as if all at once: on the safe side. */
function circuitLoads({ problem, assignments, modeOf }: Others, lit: Interval): Map<string, number> {
  const load = new Map<string, number>();
  const counted = new Set<string>();
  for (const other of assignments) {
    const use = litSpan(modeOf(other), other.phases);
    if (!use || !meet(use, lit)) continue;
    for (const id of other.lamps) {
      const lamp = problem.lamps.find((candidate) => candidate.id === id);
      if (!lamp || counted.has(id)) continue;
      counted.add(id);
      load.set(lamp.circuit, (load.get(lamp.circuit) ?? 0) + lamp.kw);
    }
  }
  return load;
}
