import { pathToFileURL } from 'node:url';
import type { Plan, Problem } from '#planner/index.ts';

export type Broken = { rule: number; stage: string | null };
export type Independent = (problem: Problem, plan: Plan) => { violations: Broken[]; cost: number };

/**
 * A checker written by somebody else, if there is one: `OVENBIRD_CHECKER` names an ES module that exports
 * `checkPlan(problem, plan)`. Without it the tests rely on the project's own checker and on the hand-made cases.
 */
export async function independentChecker(): Promise<Independent | null> {
  const file = process.env['OVENBIRD_CHECKER'];
  if (!file) return null;
  const module = (await import(pathToFileURL(file).href)) as { checkPlan: Independent };
  return module.checkPlan;
}

/** Rule and stage of everything broken, once each, sorted. */
export const brokenRules = (list: readonly Broken[]): string[] =>
  [...new Set(list.map((v) => `${v.rule} ${v.stage ?? ''}`))].sort();
