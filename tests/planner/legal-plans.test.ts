import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { checkPlan, parseProblem, plan, type Plan, type Problem } from '#planner/index.ts';
import { fixSome, generateShop, seeded } from './generate-shop.ts';
import { brokenRules, independentChecker } from './independent-checker.ts';

const independent = await independentChecker();
const seeds = fc.integer({ min: 0, max: 1_000_000 });
const runs = { numRuns: 200, seed: 20260302 };
/** Milliseconds before a test counts as hanging; says nothing about speed. */
const PATIENCE = 120_000;
const options = { seed: 1, evaluations: 30 };

function expectLegal(problem: Problem, made: Plan): void {
  const verdict = checkPlan(problem, made);
  expect(verdict.violations).toEqual([]);
  expect(made.cost).toBeCloseTo(verdict.cost, 6);
  const placed = new Set(made.assignments.map((a) => a.stage));
  const unplaced = new Map(made.unplaced.map((u) => [u.job, u]));
  for (const job of problem.jobs) {
    const entry = unplaced.get(job.id);
    if (!entry) expect(job.stages.every((s) => placed.has(s.id))).toBe(true);
    else expect(entry.reason).toMatch(/^[A-Z].* .*\.$/);
  }
  if (!independent) return;
  const theirs = independent(problem, made);
  expect(theirs.violations).toEqual([]);
  expect(theirs.cost).toBeCloseTo(verdict.cost, 6);
}

describe('every plan keeps every rule', () => {
  test(
    'on generated shops',
    () => {
      fc.assert(
        fc.property(seeds, (seed) => {
          const problem = generateShop(seed);
          expect(parseProblem(structuredClone(problem))).toEqual({ problem });
          expectLegal(problem, plan(problem, options));
        }),
        runs,
      );
    },
    PATIENCE,
  );

  test(
    'beside fixed assignments, also where those break rules',
    () => {
      fc.assert(
        fc.property(seeds, (seed) => {
          const problem = generateShop(seed);
          const replanned = fixSome(problem, plan(problem, options).assignments, seed + 1);
          expectLegal(replanned, plan(replanned, options));
        }),
        runs,
      );
    },
    PATIENCE,
  );
});

/** Breaks a plan at random: shifts, swaps people, places, modes and lamps, drops and doubles assignments. */
function damage(problem: Problem, made: Plan, seed: number): Plan {
  const random = seeded(seed);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)]!;
  const assignments = made.assignments.flatMap((a) => {
    const dice = Math.floor(random() * 12);
    const by = Math.floor(random() * 40) - 20;
    if (dice === 0) return [{ ...a, start: a.start + by }];
    if (dice === 1)
      return [
        { ...a, start: a.start + by, end: a.end + by, phases: a.phases.map(([f, t]) => [f + by, t + by] as const) },
      ];
    if (dice === 2) return [{ ...a, place: pick(problem.places).id }];
    if (dice === 3) return [{ ...a, person: random() < 0.3 ? null : pick(problem.people).id }];
    if (dice === 4) return [{ ...a, mode: `mode-${Math.floor(random() * 3)}` }];
    if (dice === 5) return [{ ...a, lamps: problem.lamps.filter(() => random() < 0.5).map((l) => l.id) }];
    if (dice === 6) return [{ ...a, load: pick(['x', 'y']) }];
    if (dice === 7 && random() < 0.3) return [];
    if (dice === 8 && random() < 0.3) return [a, a];
    return [a];
  });
  return { ...made, assignments };
}

if (independent !== null)
  test(
    'both checkers agree on damaged plans: the same rules at the same stages, the same cost',
    () => {
      fc.assert(
        fc.property(seeds, (seed) => {
          const shop = generateShop(seed);
          const whole = plan(shop, options);
          const problem = seed % 2 ? fixSome(shop, whole.assignments, seed + 1) : shop;
          const broken = damage(problem, whole, seed + 2);
          const ours = checkPlan(problem, broken);
          const theirs = independent(problem, broken);
          expect(brokenRules(ours.violations)).toEqual(brokenRules(theirs.violations));
          expect(ours.cost).toBeCloseTo(theirs.cost, 6);
        }),
        { ...runs, numRuns: 800 },
      );
    },
    PATIENCE,
  );
