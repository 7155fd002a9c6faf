import type { Plan, Problem, Progress } from '#planner/types.ts';

/** What a planning thread is asked. `flags[0]` other than 0: end now with the best so far. */
export type PlanOrder = {
  problem: Problem;
  seed: number;
  milliseconds: number;
  evaluations?: number;
  flags: SharedArrayBuffer;
};
export type PlanMessage = { kind: 'progress'; progress: Progress } | { kind: 'plan'; plan: Plan };
