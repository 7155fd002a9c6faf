import { describe, expect, test } from 'vitest';
import { checkPlan, plan, type Assignment, type Plan, type Problem } from '#planner/index.ts';
import { makeShop } from './data/make-shop.mjs';
import { mode, phase, smallShop, stage } from './small-shop.ts';

/** Milliseconds before a test counts as hanging; says nothing about speed. */
const PATIENCE = 120_000;
const MORNING = 9 * 60 + 30;

const shopOf = (seed: number): Problem =>
  makeShop({ jobs: 16, days: 2, booths: 2, prep: 4, lamps: 3, people: 6, seed, loads: false });

/** The shop at half past nine, with the plan that was posted; what has begun stands. */
const nowWith = (problem: Problem, { assignments }: Plan, moves: number): Problem => ({
  ...problem,
  now: Math.max(problem.now, MORNING),
  fixed: assignments.filter((a) => a.start < MORNING),
  baseline: assignments,
  objective: { ...problem.objective, moves },
});

const close = (problem: Problem, place: string, from: number, to: number): Problem => ({
  ...problem,
  places: problem.places.map((p) =>
    p.id === place ? { ...p, closed: [...p.closed, [from, to] as const].sort((x, y) => x[0] - y[0]) } : p,
  ),
});

describe('planning again', () => {
  test('moves nothing where nothing has happened', { timeout: PATIENCE }, () => {
    for (const seed of [1, 2, 3]) {
      const shop = shopOf(seed);
      const again = nowWith(shop, plan(shop, { seed: 1, evaluations: 400 }), 20);
      const made = plan(again, { seed: 1, evaluations: 2 });
      expect(made.unplaced).toEqual([]);
      expect(checkPlan(again, made).parts.moves).toBe(0);
    }
  });

  test('moves less the more moving costs, and keeps every rule', { timeout: PATIENCE }, () => {
    const moved = (moves: number): number =>
      [1, 2].reduce((sum, seed) => {
        const shop = shopOf(seed);
        const posted = plan(shop, { seed: 1, evaluations: 400 });
        const booth = shop.places.find((p) => p.kind === 'booth')!.id;
        const again = close(nowWith(shop, posted, moves), booth, MORNING + 60, MORNING + 180);
        const verdict = checkPlan(again, plan(again, { seed: 1, evaluations: 1200 }));
        expect(verdict.violations).toEqual([]);
        return sum + verdict.parts.moves;
      }, 0);
    const free = moved(0);
    expect(moved(50)).toBeLessThan(free * 0.75);
  });

  test('lets the job in a closed booth alone look for another place', () => {
    const spray = (id: string) =>
      stage(id, mode({ places: ['booth', 'booth-2'], phases: [phase('spray', 60, 'none')] }));
    const problem = smallShop([[spray('a')], [spray('b')], [spray('c')]]);
    const second = { ...problem.places.find((p) => p.id === 'booth')!, id: 'booth-2', zone: null };
    const at = (id: string, place: string, start: number): Assignment => ({
      stage: id,
      mode: 'way',
      place,
      person: null,
      lamps: [],
      load: null,
      start,
      end: start + 60,
      phases: [[start, start + 60]],
    });
    const again = close(
      {
        ...problem,
        places: [...problem.places, second],
        baseline: [at('a', 'booth', 60), at('b', 'booth', 200), at('c', 'booth-2', 60)],
        objective: { ...problem.objective, moves: 10_000 },
      },
      'booth',
      70,
      110,
    );
    const made = plan(again, { seed: 1, evaluations: 200 });
    const of = (id: string) => made.assignments.find((a) => a.stage === id)!;
    expect([of('b').start, of('b').place]).toEqual([200, 'booth']);
    expect([of('c').start, of('c').place]).toEqual([60, 'booth-2']);
    // Free are booth from 110 to 200 and booth-2 from 120, or before 60: an hour before fits exactly.
    expect([0, 110, 120]).toContain(of('a').start);
    expect(checkPlan(again, made)).toMatchObject({ violations: [], parts: { moves: 1 } });
  });
});
