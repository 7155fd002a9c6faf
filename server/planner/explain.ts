import { checkPlan } from './check-plan.ts';
import type { Assignment, Minutes, Mode, Plan, Problem, Violation, ViolationCode } from './types.ts';

/** What keeps a stage from starting a minute earlier: the rule it would break, and what it would clash with. */
export type Hold = { rule: number; code: ViolationCode; ids: string[]; minutes: Minutes[] };

/** One link: the stage, when it starts, and everything that holds it there. Nothing holds it: it could start earlier. */
export type Link = { stage: string; start: Minutes; holds: Hold[] };

/** Longest chain told; beyond it nobody reads on. */
const MOST_LINKS = 20;

/**
 * Why a stage starts when it does: what would break if it began a minute earlier, then why the stage that it waits for
 * stands where it does, and so on back to a release, a shift, a closed hour or something fixed.
 * Throws a RangeError for a stage that the plan does not place.
 */
export function explain(problem: Problem, plan: Plan, stageId: string): Link[] {
  const placed = new Map(plan.assignments.map((a) => [a.stage, a]));
  if (!placed.has(stageId)) throw new RangeError(`stage ${stageId} has no place in the plan`);
  const known = new Set(checkPlan(problem, plan).violations.map(print));
  const fixed = new Set(problem.fixed.map((f) => f.stage));
  const chain: Link[] = [];
  const told = new Set<string>();
  for (let at = placed.get(stageId); at && chain.length < MOST_LINKS;) {
    told.add(at.stage);
    const holds = fixed.has(at.stage) ? [] : holdsOf(problem, plan, at, known);
    chain.push({ stage: at.stage, start: at.start, holds });
    at = holds
      .flatMap((h) => h.ids)
      .map((id) => placed.get(id))
      .find((a) => a !== undefined && !told.has(a.stage));
  }
  return chain;
}

const print = (v: Violation): string => `${v.code} ${v.stage} ${v.ids.join(' ')}`;

/** What breaks when the stage, with its load, begins a minute earlier and all else stays. */
function holdsOf(problem: Problem, plan: Plan, at: Assignment, known: ReadonlySet<string>): Hold[] {
  const moves = (a: Assignment): boolean => a.stage === at.stage || (at.load !== null && a.load === at.load);
  const assignments = plan.assignments.map((a) => (moves(a) ? earlier(problem, a) : a));
  const { violations } = checkPlan(problem, { ...plan, assignments });
  const moved = new Set(assignments.filter(moves).map((a) => a.stage));
  return violations
    .filter((v) => !known.has(print(v)))
    .map(({ rule, code, stage, ids, minutes }) => ({
      rule,
      code,
      // The other one of a clash may be the one that the rule names.
      ids: moved.has(stage) ? ids.filter((id) => !moved.has(id)) : [stage, ...ids.filter((id) => !moved.has(id))],
      minutes,
    }));
}

/** The assignment a minute earlier; work that pauses keeps its working minutes. */
function earlier(problem: Problem, a: Assignment): Assignment {
  const mode = problem.jobs
    .flatMap((j) => j.stages)
    .find((s) => s.id === a.stage)
    ?.modes.find((m) => m.id === a.mode);
  const shift = problem.people.find((p) => p.id === a.person)?.working ?? [];
  let at = a.start - 1;
  const phases = a.phases.map(([from, to], k): [Minutes, Minutes] => {
    const paused = mode !== undefined && pauses(mode, k);
    const end = paused ? endOfWork(shift, at, workIn(shift, from, to)) : at + to - from;
    const phase: [Minutes, Minutes] = [at, end];
    // Idle minutes that the plan leaves between phases stay as they are.
    at = end + Math.max(0, (a.phases[k + 1]?.[0] ?? to) - to);
    return phase;
  });
  return { ...a, start: a.start - 1, end: phases[phases.length - 1]?.[1] ?? a.end - 1, phases };
}

const pauses = (mode: Mode, k: number): boolean => mode.split && mode.phases[k]?.attendance === 'hands';

const workIn = (shift: readonly (readonly [Minutes, Minutes])[], from: Minutes, to: Minutes): Minutes =>
  shift.reduce((sum, [s, e]) => sum + Math.max(0, Math.min(e, to) - Math.max(s, from)), 0);

function endOfWork(shift: readonly (readonly [Minutes, Minutes])[], from: Minutes, minutes: Minutes): Minutes {
  let left = minutes;
  let end = from;
  for (const [s, e] of [...shift].sort((x, y) => x[0] - y[0])) {
    if (e <= from || left <= 0) continue;
    const begin = Math.max(s, from);
    const part = Math.min(left, e - begin);
    left -= part;
    end = begin + part;
  }
  return end + left;
}
