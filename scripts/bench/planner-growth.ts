import { plan, type Problem } from '#planner/index.ts';
import { coreSeconds } from './core-seconds.ts';

export type Growth = {
  jobs: number;
  stages: number;
  /** Core seconds until the first whole plan was there. */
  first: number;
  /** Core seconds until the cost was within 5 % of what the whole search reached. */
  close: number;
  cost: number;
  unplaced: number;
  megabytes: number;
};

/** A shop in which booths, stations and people grow with the jobs, and the days with them. */
export const grownShop = (jobs: number): Record<string, number | boolean> => ({
  jobs,
  days: Math.max(1, jobs / 20),
  booths: Math.ceil(jobs / 40),
  prep: Math.ceil(jobs / 10) + 2,
  lamps: 6,
  people: Math.ceil(jobs / 10) + 4,
  seed: 3,
  loads: false,
});

/** Plans for `seconds` of one core and notes when which cost was reached. */
export function measureGrowth(problem: Problem, seconds: number): Growth {
  const begun = coreSeconds();
  const gone = (): number => coreSeconds() - begun;
  const reached: { at: number; cost: number; unplaced: number }[] = [];
  const made = plan(problem, {
    seed: 1,
    stop: () => gone() >= seconds,
    share: () => Math.min(1, gone() / seconds),
    onProgress: ({ cost, unplaced }) => reached.push({ at: gone(), cost, unplaced }),
  });
  const near = reached.find((r) => r.unplaced === made.unplaced.length && r.cost <= made.cost * 1.05);
  return {
    jobs: problem.jobs.length,
    stages: problem.jobs.reduce((sum, job) => sum + job.stages.length, 0),
    first: reached[0]!.at,
    close: near!.at,
    cost: made.cost,
    unplaced: made.unplaced.length,
    megabytes: Math.round(process.memoryUsage().rss / 2 ** 20),
  };
}
