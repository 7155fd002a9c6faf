import { expect, it } from 'vitest';
import type { Plan, Progress } from '#planner/types.ts';
import type { PlannerThreads, PlanRequest } from '#server/planning/planner-threads.ts';
import { twoSeeds } from '#server/planning/two-seeds.ts';
import { problemToPlan } from '#server/planning/problem/problem-to-plan.ts';
import { facts } from './factories.ts';

const { problem } = problemToPlan(facts({}, []), 'all', 1);
const planOf = (cost: number): Plan => ({
  version: 1,
  assignments: [],
  unplaced: [],
  cost,
  stats: { evaluations: 10, improvements: 1 },
});
const progress = (cost: number, evaluations: number): Progress => ({ cost, bound: null, evaluations, unplaced: 0 });

/** Threads that answer as the test says, by seed. */
function threadsOf(answer: (request: PlanRequest) => Promise<Plan>) {
  const seeds: number[] = [];
  const stopped: number[] = [];
  const threads: PlannerThreads = {
    search(request) {
      seeds.push(request.seed);
      return { plan: answer(request), stop: () => void stopped.push(request.seed) };
    },
    close: () => Promise.resolve(),
  };
  return { threads, seeds, stopped };
}

const ask = { problem, seed: 7, seconds: 1, onProgress: () => undefined };

it('answers with the better of two plans where two cores are free', async () => {
  const { threads, seeds, stopped } = threadsOf(({ seed }) => Promise.resolve(planOf(seed === 7 ? 30 : 20)));
  const search = twoSeeds(threads, () => 2).search(ask);
  search.stop();
  await expect(search.plan).resolves.toMatchObject({ cost: 20, stats: { evaluations: 20 } });
  expect(seeds).toEqual([7, 8]);
  expect(stopped).toEqual([7, 8]);
});

it('tells only of what is better than both', () => {
  const heard: Progress[] = [];
  const tell: ((p: Progress) => void)[] = [];
  const { threads } = threadsOf(({ onProgress }) => {
    tell.push(onProgress);
    return Promise.resolve(planOf(1));
  });
  twoSeeds(threads, () => 2).search({ ...ask, onProgress: (p) => heard.push(p) });
  tell[0]!(progress(50, 100));
  tell[1]!(progress(60, 40));
  tell[1]!(progress(40, 80));
  expect(heard.map(({ cost, evaluations }) => [cost, evaluations])).toEqual([
    [50, 100],
    [40, 180],
  ]);
});

it('is content with one plan where the other thread died, and says so where both did', async () => {
  const one = threadsOf(({ seed }) => (seed === 7 ? Promise.reject(new Error('gone')) : Promise.resolve(planOf(5))));
  await expect(twoSeeds(one.threads, () => 2).search(ask).plan).resolves.toMatchObject({ cost: 5 });
  const none = threadsOf(() => Promise.reject(new Error('gone')));
  await expect(twoSeeds(none.threads, () => 2).search(ask).plan).rejects.toThrow('gone');
});

it('searches once on a busy machine, and where evaluations are counted', async () => {
  const busy = threadsOf(() => Promise.resolve(planOf(5)));
  await twoSeeds(busy.threads, () => 1).search(ask).plan;
  await twoSeeds(busy.threads, () => 2).search({ ...ask, evaluations: 3 }).plan;
  expect(busy.seeds).toEqual([7, 7]);
});
