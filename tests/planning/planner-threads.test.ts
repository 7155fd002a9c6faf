import { Worker } from 'node:worker_threads';
import { afterAll, expect, it } from 'vitest';
import { checkPlan } from '#planner/index.ts';
import type { Progress } from '#planner/types.ts';
import { openPlannerThreads, PlannerThreadDied } from '#server/planning/planner-threads.ts';
import { problemToPlan } from '#server/planning/problem/problem-to-plan.ts';
import { facts, job, place, spray, stage, boothBake } from './factories.ts';

const threads = openPlannerThreads(1);
afterAll(() => threads.close());

const jobs = Array.from({ length: 12 }, () => job([stage([spray()]), stage([boothBake()])]));
const { problem } = problemToPlan(facts({ places: [place(), place()] }, jobs), 'all', 1);

it('plans in a thread of its own and tells how it goes', async () => {
  const heard: Progress[] = [];
  const search = threads.search({ problem, seed: 1, seconds: 60, evaluations: 3, onProgress: (p) => heard.push(p) });
  const plan = await search.plan;
  expect(checkPlan(problem, plan).violations).toEqual([]);
  expect(plan.assignments).toHaveLength(24);
  expect(heard.length).toBeGreaterThan(0);
});

it('ends with the best so far when it is told to', async () => {
  const search = threads.search({ problem, seed: 1, seconds: 60, onProgress: () => search.stop() });
  const plan = await search.plan;
  expect(checkPlan(problem, plan).violations).toEqual([]);
});

it('more searches than threads wait for their turn', async () => {
  const quick = { problem, seed: 1, seconds: 60, evaluations: 1, onProgress: () => undefined };
  const plans = await Promise.all([1, 2, 3].map(() => threads.search(quick).plan));
  expect(plans.map((plan) => plan.assignments.length)).toEqual([24, 24, 24]);
});

it('a thread that dies is an error for who waits, and the next search gets a fresh one', async () => {
  let started = 0;
  const dying = openPlannerThreads(1, () => {
    started += 1;
    const code =
      started === 1 ? 'process.exit(3)' : `p.postMessage({ kind: 'plan', plan: { version: 1, assignments: [] } })`;
    return new Worker(`const p = require('node:worker_threads').parentPort; p.on('message', () => { ${code} });`, {
      eval: true,
    });
  });
  const ask = () => dying.search({ problem, seed: 1, seconds: 1, onProgress: () => undefined }).plan;
  await expect(ask()).rejects.toThrow(PlannerThreadDied);
  await expect(ask()).resolves.toMatchObject({ version: 1 });
  await dying.close();
});
