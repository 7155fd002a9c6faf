import { describe, expect, test } from 'vitest';
import { checkPlan, type Mode, odds, plan, type Plan, type Problem, type Progress } from '#planner/index.ts';
import { generateLoads } from './generate-loads.ts';
import { fixSome } from './generate-shop.ts';
import { independentChecker } from './independent-checker.ts';
import { mode, phase, smallShop, stage } from './small-shop.ts';

const independent = await independentChecker();
/** Milliseconds before a test counts as hanging; says nothing about speed. */
const PATIENCE = 120_000;
const options = { seed: 1, evaluations: 200 };

const spray = (more: Partial<Mode> = {}): Mode =>
  mode({ people: ['ann'], load: 'colour', family: 'colour', phases: [phase('spray', 10, 'hands')], ...more });
const bake = (more: Partial<Mode> = {}): Mode =>
  mode({
    stay: true,
    places: [],
    load: 'bake',
    gap: { min: 10, max: 60, settle: 10 },
    phases: [phase('purge', 5, 'none'), phase('bake', 40, 'onsite'), phase('cool', 15, 'none')],
    ...more,
  });

/** Two parts, each sprayed by ann and baked where it hangs, both due at minute 95; the second as given. */
function twoParts(second: { spray?: Partial<Mode>; bake?: Partial<Mode> } = {}, more: Partial<Problem> = {}): Problem {
  const problem = smallShop(
    [
      [stage('a1', spray()), stage('a2', bake())],
      [stage('b1', spray(second.spray)), stage('b2', bake(second.bake))],
    ],
    more,
  );
  for (const job of problem.jobs) job.due = 95;
  return problem;
}

const loadsOf = ({ assignments }: Plan): string[][] => {
  const runs = new Map<string, string[]>();
  for (const { load, stage: id } of assignments)
    if (load !== null) runs.set(load, [...(runs.get(load) ?? []), id].sort());
  return [...runs.values()].sort();
};

const withoutLoads = (problem: Problem): Problem => ({
  ...problem,
  jobs: problem.jobs.map((job) => ({
    ...job,
    stages: job.stages.map((s) => ({ ...s, modes: s.modes.map((m) => ({ ...m, load: null })) })),
  })),
});

function expectLegal(problem: Problem, made: Plan): void {
  const { violations, cost } = checkPlan(problem, made);
  expect(violations).toEqual([]);
  expect(made.cost).toBeCloseTo(cost, 6);
  if (!independent) return;
  const theirs = independent(problem, made);
  expect(theirs.violations).toEqual([]);
  expect(theirs.cost).toBeCloseTo(cost, 6);
}

describe('two parts and one booth', () => {
  test('share the run where nothing else keeps both dates', () => {
    // Apart: 10 min spray, 10 min flash, 60 min purge, bake and cool, so ends at 80 and 160: 65 min late, and
    // 65 + 0.01 * (80 + 160) + 0.02 * 160 = 70.6. Together: 2 * 10 min spray, 10 flash, 60: both end at 90, in time, and
    // 0.01 * (90 + 90) + 0.02 * 90 = 3.6.
    const problem = twoParts();
    const apart = plan(withoutLoads(problem), options);
    expect(apart.cost).toBeCloseTo(70.6, 6);
    const together = plan(problem, options);
    expect(together.cost).toBeCloseTo(3.6, 6);
    expect(loadsOf(together)).toEqual([
      ['a1', 'b1'],
      ['a2', 'b2'],
    ]);
    const times = together.assignments.map((a) => [a.stage, a.start, a.end, a.place, a.person]);
    expect(times).toEqual([
      ['a1', 0, 20, 'booth', 'ann'],
      ['a2', 30, 90, 'booth', null],
      ['b1', 0, 20, 'booth', 'ann'],
      ['b2', 30, 90, 'booth', null],
    ]);
    expectLegal(problem, together);
  });

  test('run apart where sharing brings nothing', () => {
    // 90 together; apart the first is ready at 80 already, and nobody waits for the booth.
    const problem = twoParts({}, { objective: { ...smallShop([]).objective, booth: 0 } });
    problem.jobs[1]!.release = 200;
    problem.jobs[1]!.due = 300;
    expect(loadsOf(plan(problem, options))).toEqual([]);
  });

  test.each<[string, { spray?: Partial<Mode>; bake?: Partial<Mode> }]>([
    ['room: 1 and 4 units in a booth of 4', { spray: { units: 4 } }],
    ['room, in the stage that stays', { bake: { units: 4 } }],
    ['what may be sprayed together', { spray: { load: 'other colour' } }],
    ['what is never shared', { spray: { load: null } }],
    ['the next stages, which stay and are not shared', { bake: { load: null } }],
    ['the next stages, of which one does not stay', { bake: { stay: false, places: ['prep-1'] } }],
    ['families', { spray: { family: 'primer' } }],
    ['other phases', { spray: { phases: [phase('setup', 1, 'hands'), phase('spray', 10, 'hands')] } }],
    ['kinds of phases', { spray: { phases: [phase('work', 10, 'hands')] } }],
    ['people', { spray: { people: ['ben'] } }],
    ['windows that do not meet', { bake: { gap: { min: 70, max: 80, settle: 10 } } }],
  ])('do not share a run against %s', (_what, second) => {
    const problem = twoParts(second);
    const made = plan(problem, options);
    expect(made.unplaced).toEqual([]);
    expect(loadsOf(made)).toEqual([]);
    expectLegal(problem, made);
  });

  test('wait for each other, each with what it has to do before and after on its own', () => {
    // The second is masked until 25 and must be sprayed within 5 min: the run cannot begin before. Both go to the rack after.
    const problem = twoParts();
    const mask = mode({ places: ['prep-1'], people: ['ben'], phases: [phase('work', 25, 'hands')] });
    const dry = mode({
      places: ['rack'],
      gap: { min: 15, max: 15, settle: 15 },
      phases: [phase('flash', 30, 'none')],
    });
    problem.jobs[0]!.stages = [stage('a1', spray()), stage('a2', dry)];
    problem.jobs[1]!.stages = [
      stage('b0', mask),
      stage('b1', spray({ gap: { min: 0, max: 5, settle: 0 } })),
      stage('b2', dry),
    ];
    problem.jobs[1]!.release = 10;
    // Together: masked 10 to 35, sprayed 35 to 55, dry 70 to 100; apart the first is sprayed 0 to 10 and the booth is free.
    problem.places = problem.places.map((p) => (p.kind === 'booth' ? { ...p, closed: [[0, 35]] } : p));
    const [first, second] = problem.jobs;
    first!.due = second!.due = 100;
    const made = plan(problem, options);
    expect(loadsOf(made)).toEqual([['a1', 'b1']]);
    const times = made.assignments.map((a) => [a.stage, a.start, a.end]);
    expect(times).toEqual([
      ['a1', 35, 55],
      ['a2', 70, 100],
      ['b0', 10, 35],
      ['b1', 35, 55],
      ['b2', 70, 100],
    ]);
    expectLegal(problem, made);
  });
});

describe('loads that stand', () => {
  const problem = twoParts();
  const made = plan(problem, options);

  test('stay as they are, and what stays after them goes on as one load', () => {
    const fixed = made.assignments.filter((a) => ['a1', 'b1'].includes(a.stage));
    const again = { ...problem, fixed, now: 25 };
    const replanned = plan(again, options);
    expect(replanned.assignments).toEqual(made.assignments.map((a) => ({ ...a, load: expect.any(String) as string })));
    expect(loadsOf(replanned)).toEqual(loadsOf(made));
    expectLegal(again, replanned);
  });

  test('are formed again where the published plan had them', () => {
    const again = {
      ...problem,
      baseline: made.assignments,
      objective: { ...problem.objective, moves: 100 },
    };
    const replanned = plan(again, { seed: 1, evaluations: 1 });
    expect(checkPlan(again, replanned).parts.moves).toBe(0);
    expect(loadsOf(replanned)).toEqual(loadsOf(made));
  });

  test('run as one when the odds are drawn', () => {
    for (const { ends } of odds(problem, made, 5, 1, {})) expect(ends).toEqual({ p10: 90, p50: 90, p90: 90 });
    // Spraying takes half as long again, 15 min each: the run is 10 min longer.
    const slow = { a1: { low: 1.5, likely: 1.5, high: 1.5 }, b1: { low: 1.5, likely: 1.5, high: 1.5 } };
    for (const { ends } of odds(problem, made, 5, 1, slow)) expect(ends).toEqual({ p10: 100, p50: 100, p90: 100 });
  });
});

describe('generated shops', () => {
  test('every plan keeps every rule, also beside loads that are fixed or were published', { timeout: PATIENCE }, () => {
    let loads = 0;
    let fixed = 0;
    for (let seed = 0; seed < 30; seed++) {
      const problem = generateLoads(seed);
      const made = plan(problem, options);
      expectLegal(problem, made);
      loads += loadsOf(made).length;
      const now = 60 + (seed % 5) * 40;
      const begun = made.assignments.filter((a) => a.start < now);
      fixed += begun.filter((a) => a.load !== null).length;
      const later = { ...problem, now, fixed: begun, baseline: made.assignments };
      expectLegal(later, plan(later, options));
      const shaken = fixSome(problem, made.assignments, seed);
      expectLegal(shaken, plan(shaken, options));
    }
    expect(loads).toBeGreaterThan(5); // else the rules would hold for want of loads
    expect(fixed).toBeGreaterThan(3);
  });

  test('loads bring no plan that costs more than the search finds without them', { timeout: PATIENCE }, () => {
    // A search that does not know its end begins with a round of 4000 evaluations in which it forms no loads.
    const best = (problem: Problem, evaluations: number): number => {
      let calls = 0;
      let least = Infinity;
      const note = (p: Progress): void => {
        if (p.evaluations <= evaluations) least = Math.min(least, p.unplaced * 1e9 + p.cost);
      };
      plan(problem, { seed: 1, onProgress: note, stop: () => ++calls > evaluations / 16 + 100 });
      return least;
    };
    let better = 0;
    for (let seed = 0; seed < 4; seed++) {
      const problem = generateLoads(seed);
      const without = best(withoutLoads(problem), 1000);
      const allowed = best(problem, 5000);
      expect(allowed).toBeLessThanOrEqual(without + 1e-6);
      if (allowed < without - 1e-6) better++;
    }
    expect(better).toBeGreaterThan(0);
  });

  test('the same seed and evaluations give the same plan', { timeout: PATIENCE }, () => {
    for (let seed = 0; seed < 6; seed++) {
      const problem = generateLoads(seed);
      expect(plan(problem, options)).toEqual(plan(problem, options));
    }
  });
});
