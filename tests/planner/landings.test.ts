import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  type Assignment,
  checkPlan,
  type Interval,
  landings,
  type Mode,
  plan,
  type Plan,
  type Problem,
} from '#planner/index.ts';
import { generateShop } from './generate-shop.ts';
import { assign, mode, phase, smallShop, stage } from './small-shop.ts';

/** Milliseconds before a test counts as hanging; says nothing about speed. */
const PATIENCE = 240_000;

function subsets<T>(list: readonly T[], size: number): T[][] {
  if (size === 0) return [[]];
  return list.flatMap((x, i) => subsets(list.slice(i + 1), size - 1).map((rest) => [x, ...rest]));
}

/** The stage's phases from `start` on, back to back; paused work by the person's shift. Null: it cannot begin there. */
function layOut(problem: Problem, m: Mode, person: string | null, start: number): Interval[] | null {
  const shift = problem.people.find((p) => p.id === person)?.working ?? [];
  const working = (at: number): boolean => shift.some(([s, e]) => s <= at && at < e);
  let at = start;
  const out: Interval[] = [];
  for (const p of m.phases) {
    const from = at;
    if (!(m.split && p.attendance === 'hands')) at += p.minutes;
    else
      for (let left = p.minutes; left > 0; at++) {
        if (at > problem.horizon) return null;
        if (working(at)) left--;
      }
    out.push([from, at]);
  }
  return out;
}

/** Every start in the place, minute by minute, asked of the checker. */
function scan(problem: Problem, made: Plan, stageId: string, place: string): number[] {
  const modes = problem.jobs.flatMap((j) => j.stages).find((s) => s.id === stageId)!.modes;
  const others = made.assignments.filter((a) => a.stage !== stageId);
  const fits = (start: number): boolean =>
    modes.some((m) => {
      const hands = m.phases.some((p) => p.attendance === 'hands');
      return (hands ? m.people : [null]).some((person) => {
        const phases = layOut(problem, m, person, start);
        if (!phases) return false;
        return subsets(m.lamps, m.lampCount).some((lamps) => {
          const a: Assignment = {
            stage: stageId,
            mode: m.id,
            place,
            person,
            lamps,
            load: null,
            start,
            end: phases[phases.length - 1]![1],
            phases,
          };
          return checkPlan(problem, { ...made, assignments: [...others, a] }).violations.length === 0;
        });
      });
    });
  return Array.from({ length: problem.horizon + 1 }, (_, t) => t).filter(fits);
}

const minutes = (list: readonly Interval[]): number[] =>
  list.flatMap(([from, to]) => Array.from({ length: to - from }, (_, k) => from + k));

/** Generated shops small enough to scan, without waits (those are laid out as early as can be, not in every way) and without stages that take no time. */
function smallProblem(seed: number): Problem {
  const p = generateShop(seed);
  const horizon = 500;
  const cut = (list: readonly Interval[]): Interval[] => list.filter(([s]) => s < horizon);
  return {
    ...p,
    horizon,
    now: 0,
    open: cut(p.open),
    people: p.people.map((x) => ({ ...x, working: cut(x.working) })),
    jobs: p.jobs.slice(0, 4).map((job) => ({
      ...job,
      release: Math.min(job.release, 100),
      stages: job.stages.map((s) => ({
        ...s,
        modes: s.modes.map((m) => ({
          ...m,
          phases: m.phases.map((ph) => ({ ...ph, wait: 0, minutes: Math.max(1, ph.minutes) })),
        })),
      })),
    })),
  };
}

describe('landings', () => {
  test('are exactly the starts at which the checker finds nothing broken', { timeout: PATIENCE }, () => {
    let asked = 0;
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 1_000_000 }), fc.nat(), (seed, pick) => {
        const problem = smallProblem(seed);
        const made = plan(problem, { seed: 1, evaluations: 5 });
        const own = made.assignments[pick % Math.max(1, made.assignments.length)];
        if (!own) return;
        for (const landing of landings(problem, made, own.stage)) {
          const want = scan(problem, made, own.stage, landing.place);
          expect(minutes(landing.starts)).toEqual(want);
          expect(landing.why === null).toBe(want.length > 0);
          asked += want.length;
        }
      }),
      { numRuns: 15, seed: 7 },
    );
    expect(asked).toBeGreaterThan(500); // else the property would hold for want of landings
  });

  test('say why a stage may not go to a place', () => {
    const cool = mode({ places: ['booth', 'rack'], units: 3, phases: [phase('cool', 20, 'none')] });
    const stay = mode({ stay: true, places: [], phases: [phase('bake', 20, 'none')] });
    const problem = smallShop([
      [stage('a', cool), stage('b', stay)],
      [stage('c', mode({ phases: [phase('cool', 20, 'none')] }))],
    ]);
    const made = plan(problem, { seed: 1, evaluations: 20 });
    const why = (id: string) => Object.fromEntries(landings(problem, made, id).map((l) => [l.place, l.why]));
    expect(why('a')).toEqual({
      booth: null,
      'prep-1': 'place-not-allowed',
      'prep-2': 'place-not-allowed',
      rack: 'does-not-fit',
    });
    expect(why('b')).toMatchObject({ booth: null, rack: 'must-stay' });
    expect(why('c')).toMatchObject({ booth: null });
    const fixed = { ...problem, fixed: [made.assignments.find((a) => a.stage === 'c')!] };
    expect(new Set(landings(fixed, made, 'c').map((l) => l.why))).toEqual(new Set(['fixed']));
    expect(() => landings(problem, made, 'no')).toThrow(RangeError);
  });

  test('a stage that runs in a load does not leave it alone', () => {
    const shared = (id: string) => stage(id, mode({ load: 'x', phases: [phase('cool', 20, 'none')] }));
    const problem = smallShop([[shared('a')], [shared('b')]]);
    const made: Plan = {
      version: 1,
      assignments: ['a', 'b'].map((id) => assign(id, 0, [20], { load: 'l' })),
      unplaced: [],
      cost: 0,
      stats: { evaluations: 0, improvements: 0 },
    };
    expect(checkPlan(problem, made).violations).toEqual([]);
    expect(new Set(landings(problem, made, 'a').map((l) => l.why))).toEqual(new Set(['in-a-load']));
  });
});
