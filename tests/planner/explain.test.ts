import { describe, expect, test } from 'vitest';
import { explain, type Plan } from '#planner/index.ts';
import { assign, mode, phase, smallShop, stage } from './small-shop.ts';

const planOf = (assignments: Plan['assignments']): Plan => ({
  version: 1,
  assignments,
  unplaced: [],
  cost: 0,
  stats: { evaluations: 0, improvements: 0 },
});

const cool = (id: string, more: object = {}) => stage(id, mode({ phases: [phase('cool', 20, 'none')], ...more }));
const spray = (id: string) => stage(id, mode({ people: ['ann'], phases: [phase('spray', 20, 'hands')] }));
const told = (chain: ReturnType<typeof explain>) => chain.map((l) => [l.stage, l.start, ...l.holds.map((h) => h.code)]);

describe('explain', () => {
  test('follows a flash back to the booth and to the release of what stood there first', () => {
    const problem = smallShop([
      [cool('a')],
      [cool('b'), cool('c', { places: ['prep-1'], gap: { min: 15, max: null, settle: 0 } })],
    ]);
    problem.jobs[0]!.release = 30;
    const made = planOf([assign('a', 30, [20]), assign('b', 50, [20]), assign('c', 85, [20], { place: 'prep-1' })]);
    expect(told(explain(problem, made, 'c'))).toEqual([
      ['c', 85, 'too-soon'],
      ['b', 50, 'place-taken'],
      ['a', 30, 'before-release'],
    ]);
  });

  test('names the person and the end of the break', () => {
    const problem = smallShop([[spray('a')], [spray('b')]]);
    const made = planOf([assign('a', 150, [20], { person: 'ann' }), assign('b', 170, [20], { person: 'ann' })]);
    const chain = explain(problem, made, 'b');
    expect(chain[0]!.holds.map((h) => h.code).sort()).toEqual(['person-busy', 'place-taken']);
    expect(chain[0]!.holds.every((h) => h.ids.includes('a'))).toBe(true);
    expect(told(chain).slice(1)).toEqual([['a', 150, 'off-shift']]);
  });

  test('says when nothing holds a stage, and when it is fixed', () => {
    const problem = smallShop([[cool('a')]]);
    const made = planOf([assign('a', 40, [20])]);
    expect(explain(problem, made, 'a')).toEqual([{ stage: 'a', start: 40, holds: [] }]);
    const fixed = smallShop([[cool('a')], [cool('b')]], { fixed: [assign('a', 40, [20])] });
    const beside = planOf([assign('a', 40, [20]), assign('b', 60, [20])]);
    expect(told(explain(fixed, beside, 'b'))).toEqual([
      ['b', 60, 'place-taken'],
      ['a', 40],
    ]);
    expect(() => explain(problem, made, 'z')).toThrow(RangeError);
  });

  test('a stage held back by what has to follow it', () => {
    const tight = cool('b', { places: ['prep-1'], gap: { min: 0, max: 10, settle: 0 } });
    const problem = smallShop([[cool('a'), tight], [cool('c', { places: ['prep-1'] })]]);
    const made = planOf([assign('c', 0, [60], {}), assign('a', 30, [20]), assign('b', 60, [20], { place: 'prep-1' })]);
    made.assignments[0] = assign('c', 0, [20], { place: 'prep-1' });
    const holds = explain(problem, made, 'a')[0]!.holds;
    expect(holds).toEqual([{ rule: 2, code: 'too-late', ids: ['b'], minutes: [11, 10] }]);
  });
});
