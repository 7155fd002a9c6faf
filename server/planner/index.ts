export { checkPlan } from './check-plan.ts';
export { explain, type Hold, type Link } from './explain.ts';
export { type Landing, landings, type LandingReason, type Window } from './landings.ts';
export { type JobOdds, odds, type Spread } from './odds.ts';
export { parseProblem } from './parse-problem.ts';
export { closingMilliseconds, plan } from './plan.ts';
export type * from './types.ts';
