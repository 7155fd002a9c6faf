export { checkPlan } from './check-plan.ts';
export { parseProblem } from './parse-problem.ts';
export { plan } from './plan.ts';
export type * from './types.ts';
