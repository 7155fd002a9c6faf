import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { checkPlan, plan, type Progress } from '#planner/index.ts';
import { fixSome, generateShop } from './generate-shop.ts';
import { mode, phase, smallShop, stage } from './small-shop.ts';

/** Milliseconds before a test counts as hanging; says nothing about speed. */
const PATIENCE = 120_000;
const cool = (id: string, more: object = {}) => stage(id, mode({ phases: [phase('cool', 20, 'none')], ...more }));

describe('the search', () => {
  test('gives the same plan for the same seed and evaluations', { timeout: PATIENCE }, () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 1_000_000 }), (seed) => {
        const problem = generateShop(seed);
        const options = { seed, evaluations: 300 };
        const once = plan(problem, options);
        expect(plan(problem, options)).toEqual(once);
        expect(once.stats.evaluations).toBeLessThanOrEqual(300 + 1);
      }),
      { numRuns: 30, seed: 3 },
    );
  });

  test('never costs less than its lower bound, and more evaluations never cost more', { timeout: PATIENCE }, () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 1_000_000 }), fc.boolean(), (seed, fixed) => {
        const shop = generateShop(seed);
        const problem = fixed ? fixSome(shop, plan(shop, { seed: 1, evaluations: 20 }).assignments, seed) : shop;
        const seen: Progress[] = [];
        const made = plan(problem, { seed: 1, evaluations: 300, onProgress: (p) => seen.push(p) });
        expect(made.bound).toBeLessThanOrEqual(made.cost + 1e-6);
        const rank = seen.map((p) => p.unplaced * 1e9 + p.cost);
        expect(rank).toEqual([...rank].sort((x, y) => y - x));
      }),
      { numRuns: 50, seed: 5 },
    );
  });

  test('leaves no job out for a breach of its own: the last check finds nothing', { timeout: PATIENCE }, () => {
    for (let seed = 0; seed < 80; seed++) {
      const { unplaced } = plan(generateShop(seed), { seed: 1, evaluations: 150 });
      expect(unplaced.filter((u) => u.reason.startsWith('Beside what is fixed'))).toEqual([]);
    }
  });

  test('stops when it is told to, with a whole plan', () => {
    const problem = smallShop(['a', 'b', 'c', 'd', 'e'].map((id) => [cool(id)]));
    let asked = 0;
    const made = plan(problem, { seed: 1, stop: () => ++asked >= 3 });
    expect(asked).toBe(3);
    expect(made.assignments).toHaveLength(5);
  });

  test('keeps to the published plan where moves cost, and leaves it where they do not', () => {
    const problem = smallShop([[cool('a')], [cool('b')]]);
    const made = plan(problem, { seed: 1, evaluations: 50 });
    // Published: half an hour later than it could be.
    const baseline = made.assignments.map((a) => ({
      ...a,
      start: a.start + 30,
      end: a.end + 30,
      phases: a.phases.map(([f, t]) => [f + 30, t + 30] as const),
    }));
    const replan = (moves: number) => {
      const again = { ...problem, baseline, objective: { ...problem.objective, moves } };
      return checkPlan(again, plan(again, { seed: 1, evaluations: 300 })).parts.moves;
    };
    expect(replan(1000)).toBe(0);
    expect(replan(0)).toBe(2);
  });
});

describe('a job without room', () => {
  const why = (stages: ReturnType<typeof stage>[], more = {}) => {
    const { unplaced } = plan(smallShop([stages], more), { seed: 1, evaluations: 10 });
    expect(unplaced).toHaveLength(1);
    return [unplaced[0]!.stage, unplaced[0]!.reason];
  };

  test('is listed with the stage and a sentence for the people in the shop', () => {
    expect(why([cool('a', { places: [] })])).toEqual(['a', 'A cannot be done: no place will do for it.']);
    expect(why([stage('spray', mode({ phases: [phase('spray', 20, 'hands')] }))])[1]).toBe(
      'Spray cannot be done: nobody may do it.',
    );
    expect(why([cool('a', { places: ['rack'], units: 3 })])[1]).toBe(
      'A cannot be done: none of rack has room for its 3 units.',
    );
    const long = mode({ people: ['ann'], phases: [phase('spray', 500, 'hands')] });
    expect(why([stage('spray', long)])[1]).toBe(
      'Spray cannot be done: it takes 8 h 20 min without a break, and the longest stretch of work is 7 h 30 min.',
    );
    expect(why([cool('a'), cool('b')], { horizon: 30 })).toEqual(['b', expect.stringMatching(/horizon/)]);
  });

  test('names a window that has closed already', () => {
    const late = cool('b', { gap: { min: 0, max: 60, settle: 0 } });
    const fixed = [
      {
        stage: 'a',
        mode: 'way',
        place: 'booth',
        person: null,
        lamps: [],
        load: null,
        start: 0,
        end: 20,
        phases: [[0, 20] as const],
      },
    ];
    expect(why([cool('a'), late], { fixed, now: 100 })).toEqual([
      'b',
      'The window of 1 h after the stage before it closed 20 min ago.',
    ]);
  });
});
