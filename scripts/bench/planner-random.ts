import { checkPlan, parseProblem, plan, type Plan, type Problem } from '#planner/index.ts';
import { fixSome, generateShop } from '../../tests/planner/generate-shop.ts';
import { independentChecker } from '../../tests/planner/independent-checker.ts';
import { coreSeconds } from './core-seconds.ts';

export type RandomRuns = {
  problems: number;
  /** What was wrong, one line each; none is what is hoped for. */
  faults: string[];
  unplaced: number;
  /** Core milliseconds by which the slowest run passed its stop. */
  worstOverrun: number;
  judges: number;
};

/** Core milliseconds each search is given. */
const BUDGET = 40;

/**
 * Plans many small shops full of corners, every other one beside fixed assignments of which some break rules. Asks the
 * project's checker about every plan, and another one where `OVENBIRD_CHECKER` names it.
 */
export async function runRandomProblems(count: number): Promise<RandomRuns> {
  const independent = await independentChecker();
  const result: RandomRuns = { problems: count, faults: [], unplaced: 0, worstOverrun: 0, judges: independent ? 2 : 1 };
  for (let seed = 1; seed <= count; seed++) {
    const shop = generateShop(seed);
    const problem = seed % 2 ? shop : fixSome(shop, plan(shop, { seed: 1, evaluations: 30 }).assignments, seed);
    const blame = (what: string): number => result.faults.push(`problem ${seed}: ${what}`);
    if ('faults' in parseProblem(structuredClone(problem))) blame('is refused');
    const { made, overrun } = timed(problem);
    result.worstOverrun = Math.max(result.worstOverrun, overrun);
    result.unplaced += made.unplaced.length;
    for (const v of checkPlan(problem, made).violations) blame(`rule ${v.rule} ${v.code} ${v.stage}`);
    for (const v of independent?.(problem, made).violations ?? []) blame(`rule ${v.rule}, says the other checker`);
    for (const job of dropped(problem, made)) blame(`${job} is neither planned nor listed`);
  }
  return result;
}

function timed(problem: Problem): { made: Plan; overrun: number } {
  const begun = coreSeconds();
  const gone = (): number => (coreSeconds() - begun) * 1000;
  const made = plan(problem, { seed: 1, stop: () => gone() >= BUDGET, share: () => Math.min(1, gone() / BUDGET) });
  return { made, overrun: gone() - BUDGET };
}

/** Jobs of which something is missing without a word. */
function dropped(problem: Problem, made: Plan): string[] {
  const placed = new Set(made.assignments.map((a) => a.stage));
  const listed = new Set(made.unplaced.filter((u) => u.reason !== '').map((u) => u.job));
  return problem.jobs
    .filter((job) => !listed.has(job.id) && !job.stages.every((s) => placed.has(s.id)))
    .map((job) => job.id);
}
