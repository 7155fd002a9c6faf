import { describe, expect, test } from 'vitest';
import { checkPlan, plan } from '#planner/index.ts';
import { classicProblem, readClassics } from './classics.ts';

const DATA = new URL('./data', import.meta.url).pathname;
const jobShop = readClassics(DATA, 'jobshop.json');
const flexible = readClassics(DATA, 'flexible-jobshop.json');
const PATIENCE = 120_000;

const named = (list: typeof jobShop.instances, name: string) => list.find((i) => i.name.toLowerCase() === name)!;

// Best-known values: public tables of bounds, named in the data files; instances by Fisher and Thompson (1963), Lawrence
// (1984) and Brandimarte (1993). Budgets are evaluations, so a slow machine finds the same plans.
describe('published optima of the job shop', () => {
  test.each<[string, number]>([
    ['ft06', 3000],
    ['la01', 3000],
    ['la02', 60_000],
    ['la03', 60_000],
    ['la04', 30_000],
    ['la05', 1000],
    ['la06', 3000],
    ['la10', 3000],
    ['la14', 3000],
    ['la31', 20_000],
  ])('%s within %i evaluations', { timeout: PATIENCE }, (name, evaluations) => {
    const instance = named(jobShop.instances, name);
    const problem = classicProblem(instance);
    const made = plan(problem, { seed: 1, evaluations });
    expect(checkPlan(problem, made).violations).toEqual([]);
    expect(made.cost).toBe(instance.ub);
    expect(made.bound).toBeLessThanOrEqual(instance.lb);
  });
});

describe('best-known makespans of the flexible job shop', () => {
  test.each<[string, number]>([
    ['mk01', 40_000],
    ['mk03', 20_000],
    ['mk08', 20_000],
  ])('%s within %i evaluations', { timeout: PATIENCE }, (name, evaluations) => {
    const instance = named(flexible.instances, name);
    const problem = classicProblem(instance);
    const made = plan(problem, { seed: 1, evaluations });
    expect(checkPlan(problem, made).violations).toEqual([]);
    expect(made.cost).toBe(instance.ub);
  });
});

describe('lower bounds', () => {
  test('never pass a proved optimum', () => {
    for (const instance of jobShop.instances) {
      const { bound } = plan(classicProblem(instance), { seed: 1, evaluations: 1 });
      expect(bound, instance.name).toBeLessThanOrEqual(instance.ub);
    }
  });
});

test('the same seed and evaluations give the same plan, another seed may not', { timeout: PATIENCE }, () => {
  const problem = classicProblem(named(jobShop.instances, 'la02'), true);
  const once = plan(problem, { seed: 4, evaluations: 800 });
  expect(plan(problem, { seed: 4, evaluations: 800 })).toEqual(once);
  expect(once.stats.evaluations).toBe(800);
});
