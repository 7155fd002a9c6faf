import { costParts, weigh } from './cost.ts';
import { type Rule, viewPlan } from './plan-view.ts';
import { circuits } from './rules/circuits.ts';
import { cleanUp } from './rules/clean-up.ts';
import { closed } from './rules/closed.ts';
import { fixedStands } from './rules/fixed.ts';
import { hands } from './rules/hands.ts';
import { lamps } from './rules/lamps.ts';
import { loads } from './rules/loads.ts';
import { oneLoad } from './rules/one-load.ts';
import { order } from './rules/order.ts';
import { premises } from './rules/premises.ts';
import { sprayAndLamps } from './rules/spray-and-lamps.ts';
import { staying } from './rules/staying.ts';
import { windows } from './rules/windows.ts';
import type { Plan, Problem, Verdict, Violation } from './types.ts';

/** In the order of their numbers, 1 to 13. */
const RULES: readonly Rule[] = [
  order,
  windows,
  staying,
  oneLoad,
  loads,
  cleanUp,
  closed,
  hands,
  premises,
  lamps,
  circuits,
  sprayAndLamps,
  fixedStands,
];

/** Asks every rule about a plan and prices it. Fixed assignments are never at fault among themselves (rule 13). */
export function checkPlan(problem: Problem, plan: Plan): Verdict {
  const view = viewPlan(problem, plan);
  const violations: Violation[] = [];
  RULES.forEach((rule, i) =>
    rule(view, (code, stage, ids = [], minutes = []) => violations.push({ rule: i + 1, code, stage, ids, minutes })),
  );
  const parts = costParts(view);
  return { violations, cost: weigh(parts, problem.objective), parts };
}
