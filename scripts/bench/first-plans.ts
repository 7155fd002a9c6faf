import { plan, type Problem } from '#planner/index.ts';

export type FirstPlan = {
  name: string;
  jobs: number;
  stages: number;
  milliseconds: number;
  cost: number;
  unplaced: number;
};

/** The time to the first whole plan: the middle of five runs after one to warm up. */
export function timeFirstPlan(name: string, problem: Problem): FirstPlan {
  const run = (): { milliseconds: number; cost: number; unplaced: number } => {
    const start = performance.now();
    const { cost, unplaced } = plan(problem, { seed: 1, evaluations: 1 });
    return { milliseconds: performance.now() - start, cost, unplaced: unplaced.length };
  };
  run();
  const runs = Array.from({ length: 5 }, run).sort((a, b) => a.milliseconds - b.milliseconds);
  const stages = problem.jobs.reduce((sum, job) => sum + job.stages.length, 0);
  return { name, jobs: problem.jobs.length, stages, ...runs[2]! };
}
