import { describe, expect, test } from 'vitest';
import { type Assignment, checkPlan, type Plan, type Problem, type Stage, type ViolationCode } from '#planner/index.ts';
import { brokenRules, independentChecker } from './independent-checker.ts';
import { assign, mode, phase, smallShop, stage } from './small-shop.ts';

const independent = await independentChecker();
const planOf = (assignments: Assignment[], unplaced: Plan['unplaced'] = []): Plan => ({
  version: 1,
  assignments,
  unplaced,
  cost: 0,
  stats: { evaluations: 0, improvements: 0 },
});

type Case = {
  rule: number;
  what: string;
  code: ViolationCode;
  at: string;
  problem: Problem;
  good: Assignment[];
  bad: Assignment[];
};

const cure = (id: string, minutes = 20, more: Parameters<typeof mode>[0] | object = {}): Stage =>
  stage(id, mode({ phases: [phase('cool', minutes, 'none')], ...more }));
const coat = (id: string, more: object = {}): Stage =>
  stage(
    id,
    mode({
      places: ['booth', 'prep-1', 'prep-2'],
      people: ['ann', 'ben'],
      phases: [phase('spray', 20, 'hands')],
      ...more,
    }),
  );
const lamp = (id: string): Stage =>
  stage(
    id,
    mode({
      places: ['prep-1', 'prep-2'],
      lamps: ['lamp-1', 'lamp-2'],
      lampCount: 1,
      phases: [phase('bake', 30, 'none', { lamp: true })],
    }),
  );

const gap = { min: 10, max: 30, settle: 10 };
const lit = (id: string, start: number, name: string, place: string): Assignment =>
  assign(id, start, [30], { lamps: [name], place });
const fixedCure = assign('a', 100, [20]);

const CASES: Case[] = [
  {
    rule: 1,
    what: 'a stage before its release',
    code: 'before-release',
    at: 'a',
    problem: {
      ...smallShop([[cure('a')]]),
      jobs: [{ id: 'job-1', release: 50, due: null, weight: 1, stages: [cure('a')] }],
    },
    good: [assign('a', 50, [20])],
    bad: [assign('a', 49, [20])],
  },
  {
    rule: 1,
    what: 'idle minutes between phases',
    code: 'phase-wait',
    at: 'a',
    problem: smallShop([
      [stage('a', mode({ phases: [phase('bake', 10, 'none', { wait: 5 }), phase('cool', 10, 'none')] }))],
    ]),
    good: [
      {
        ...assign('a', 0, [10, 10]),
        end: 25,
        phases: [
          [0, 10],
          [15, 25],
        ],
      },
    ],
    bad: [
      {
        ...assign('a', 0, [10, 10]),
        end: 26,
        phases: [
          [0, 10],
          [16, 26],
        ],
      },
    ],
  },
  {
    rule: 2,
    what: 'a recoat window missed',
    code: 'too-late',
    at: 'b',
    problem: smallShop([[cure('a'), cure('b', 20, { gap })]]),
    good: [assign('a', 0, [20]), assign('b', 50, [20])],
    bad: [assign('a', 0, [20]), assign('b', 51, [20])],
  },
  {
    rule: 2,
    what: 'a flash cut short',
    code: 'too-soon',
    at: 'b',
    problem: smallShop([[cure('a'), cure('b', 20, { gap, places: ['prep-1'] })]]),
    good: [assign('a', 0, [20]), assign('b', 30, [20], { place: 'prep-1' })],
    bad: [assign('a', 0, [20]), assign('b', 29, [20], { place: 'prep-1' })],
  },
  {
    rule: 3,
    what: 'a part moved though it stays',
    code: 'moved-while-staying',
    at: 'b',
    problem: smallShop([[cure('a'), cure('b', 20, { stay: true, places: [] })]]),
    good: [assign('a', 0, [20]), assign('b', 20, [20])],
    bad: [assign('a', 0, [20]), assign('b', 20, [20], { place: 'prep-1' })],
  },
  {
    rule: 4,
    what: 'two loads in a booth',
    code: 'place-taken',
    at: 'b',
    problem: smallShop([[cure('a')], [cure('b')]]),
    good: [assign('a', 0, [20]), assign('b', 20, [20])],
    bad: [assign('a', 0, [20]), assign('b', 19, [20])],
  },
  {
    rule: 4,
    what: 'a place taken while the part in it settles',
    code: 'place-taken',
    at: 'c',
    problem: smallShop([[cure('a'), cure('b', 20, { places: ['prep-1'], gap })], [cure('c')]]),
    good: [assign('a', 0, [20]), assign('b', 30, [20], { place: 'prep-1' }), assign('c', 30, [20])],
    bad: [assign('a', 0, [20]), assign('b', 30, [20], { place: 'prep-1' }), assign('c', 29, [20])],
  },
  {
    rule: 4,
    what: 'a rack too full',
    code: 'rack-full',
    at: 'c',
    problem: smallShop([
      [cure('a', 20, { places: ['rack'] })],
      [cure('b', 20, { places: ['rack'] })],
      [cure('c', 20, { places: ['rack'] })],
    ]),
    good: ['a', 'b', 'c'].map((id, k) => assign(id, k === 2 ? 20 : 0, [20], { place: 'rack' })),
    bad: ['a', 'b', 'c'].map((id, k) => assign(id, k === 2 ? 19 : 0, [20], { place: 'rack' })),
  },
  {
    rule: 1,
    what: 'a load whose work does not add up (rule 5 gives the minutes)',
    code: 'phase-length',
    at: 'a',
    problem: smallShop(['a', 'b'].map((id) => [coat(id, { load: 'colour' })])),
    good: ['a', 'b'].map((id) => assign(id, 0, [40], { person: 'ann', load: 'x' })),
    bad: ['a', 'b'].map((id) => assign(id, 0, [20], { person: 'ann', load: 'x' })),
  },
  {
    rule: 5,
    what: 'a load of stages that never share',
    code: 'load-not-shared',
    at: 'b',
    problem: smallShop([[cure('a', 20, { load: 'bake' })], [cure('b')]]),
    good: [assign('a', 0, [20]), assign('b', 20, [20])],
    bad: ['a', 'b'].map((id) => assign(id, 0, [20], { load: 'x' })),
  },
  {
    rule: 6,
    what: 'no time to clean the booth',
    code: 'clean-up',
    at: 'b',
    problem: smallShop([[cure('a', 20, { family: 'primer' })], [cure('b', 20, { family: 'colour' })]]),
    good: [assign('a', 0, [20]), assign('b', 35, [20])],
    bad: [assign('a', 0, [20]), assign('b', 34, [20])],
  },
  {
    rule: 7,
    what: 'a booth used while it is closed',
    code: 'place-closed',
    at: 'a',
    problem: smallShop([[cure('a')]]),
    good: [assign('a', 680, [20])],
    bad: [assign('a', 681, [20])],
  },
  {
    rule: 7,
    what: 'a lamp used while it is closed',
    code: 'lamp-closed',
    at: 'a',
    problem: smallShop([[lamp('a')]]),
    good: [lit('a', 770, 'lamp-1', 'prep-2')],
    bad: [lit('a', 771, 'lamp-1', 'prep-2')],
  },
  {
    rule: 8,
    what: 'work into the break',
    code: 'off-shift',
    at: 'a',
    problem: smallShop([[coat('a')]]),
    good: [assign('a', 100, [20], { person: 'ann' })],
    bad: [assign('a', 101, [20], { person: 'ann' })],
  },
  {
    rule: 8,
    what: 'split work that counts the break',
    code: 'off-shift',
    at: 'a',
    problem: smallShop([[coat('a', { split: true })]]),
    good: [{ ...assign('a', 110, [50]), person: 'ann' }],
    bad: [{ ...assign('a', 110, [20]), person: 'ann' }],
  },
  {
    rule: 8,
    what: 'one person at two things',
    code: 'person-busy',
    at: 'b',
    problem: smallShop([[coat('a')], [coat('b')]]),
    good: [assign('a', 0, [20], { person: 'ann' }), assign('b', 0, [20], { person: 'ben', place: 'prep-1' })],
    bad: [assign('a', 0, [20], { person: 'ann' }), assign('b', 0, [20], { person: 'ann', place: 'prep-1' })],
  },
  {
    rule: 9,
    what: 'baking with nobody there',
    code: 'nobody-there',
    at: 'a',
    problem: smallShop([[stage('a', mode({ phases: [phase('bake', 40, 'onsite')] }))]]),
    good: [assign('a', 560, [40])],
    bad: [assign('a', 561, [40])],
  },
  {
    rule: 10,
    what: 'a lamp without time to roll it over',
    code: 'lamp-busy',
    at: 'b',
    problem: smallShop([[lamp('a')], [lamp('b')]]),
    good: [lit('a', 0, 'lamp-1', 'prep-1'), lit('b', 35, 'lamp-1', 'prep-2')],
    bad: [lit('a', 0, 'lamp-1', 'prep-1'), lit('b', 34, 'lamp-1', 'prep-2')],
  },
  {
    rule: 11,
    what: 'two lamps on a circuit for one',
    code: 'circuit-full',
    at: 'b',
    problem: smallShop([[lamp('a')], [lamp('b')]]),
    good: [lit('a', 0, 'lamp-1', 'prep-1'), lit('b', 30, 'lamp-2', 'prep-2')],
    bad: [lit('a', 0, 'lamp-1', 'prep-1'), lit('b', 29, 'lamp-2', 'prep-2')],
  },
  {
    rule: 12,
    what: 'a lamp lit before the purge is over',
    code: 'spray-meets-lamp',
    at: 'b',
    problem: smallShop([[coat('a')], [lamp('b')]]),
    good: [assign('a', 0, [20], { person: 'ann' }), lit('b', 23, 'lamp-1', 'prep-1')],
    bad: [assign('a', 0, [20], { person: 'ann' }), lit('b', 22, 'lamp-1', 'prep-1')],
  },
  {
    rule: 13,
    what: 'a fixed stage moved',
    code: 'fixed-changed',
    at: 'a',
    problem: smallShop([[cure('a')]], { fixed: [fixedCure] }),
    good: [fixedCure],
    bad: [assign('a', 101, [20])],
  },
];

describe('a plan that breaks one rule by a minute', () => {
  test.each(CASES)('rule $rule: $what', ({ rule, code, at, problem, good, bad }) => {
    expect(checkPlan(problem, planOf(good)).violations).toEqual([]);
    const { violations } = checkPlan(problem, planOf(bad));
    expect(new Set(violations.map((v) => `${v.rule} ${v.code}`))).toEqual(new Set([`${rule} ${code}`]));
    expect(violations.map((v) => v.stage)).toContain(at);
    if (independent) expect(brokenRules(independent(problem, planOf(bad)).violations)).toEqual(brokenRules(violations));
  });

  test('every rule has a case', () => {
    expect([...new Set(CASES.map((c) => c.rule))].sort((x, y) => x - y)).toEqual([
      1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13,
    ]);
  });

  test('a job is whole or listed as unplaced, with a reason', () => {
    const problem = smallShop([[cure('a'), cure('b')]]);
    const codes = (p: Plan) => checkPlan(problem, p).violations.map((v) => v.code);
    expect(codes(planOf([]))).toEqual(['stage-missing']);
    expect(codes(planOf([assign('a', 0, [20])], [{ job: 'job-1', stage: 'b', reason: 'Full.' }]))).toEqual([
      'half-unplaced',
    ]);
    expect(codes(planOf([], [{ job: 'job-1', stage: 'a', reason: '' }]))).toEqual(['unplaced-without-reason']);
    expect(codes(planOf([], [{ job: 'job-1', stage: 'a', reason: 'Full.' }]))).toEqual([]);
  });
});

test('the cost is the weighted sum that the problem asks for', () => {
  const stages = [cure('a'), cure('b', 40, { gap })];
  const problem = smallShop([stages], {
    jobs: [{ id: 'job-1', release: 5, due: 60, weight: 2, stages }],
    baseline: [assign('a', 10, [20]), assign('b', 45, [40])],
    objective: { tardiness: 1, flow: 0.5, makespan: 0.25, booth: 0.1, moves: 7, unplaced: 1000 },
  });
  const { cost, parts } = checkPlan(problem, planOf([assign('a', 10, [20]), assign('b', 50, [40])]));
  // b ends at 90: 30 late, 85 in the shop, twice each; the booth is held [10, 30 + 10) and [50, 90); b has moved.
  expect(parts).toEqual({ tardiness: 60, flow: 170, makespan: 90, booth: 70, moves: 1, unplaced: 0 });
  expect(cost).toBeCloseTo(60 + 85 + 22.5 + 7 + 7, 9);
});
