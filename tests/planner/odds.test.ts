import { describe, expect, test } from 'vitest';
import { odds, plan } from '#planner/index.ts';
import { mode, phase, smallShop, stage } from './small-shop.ts';

const prep = (id: string) => ({
  ...stage(id, mode({ places: ['prep-1'], people: ['ann'], phases: [phase('work', 100, 'hands')], split: true })),
  kind: 'prep',
});
const problem = () =>
  smallShop([[prep('a')]], {
    people: [
      { id: 'ann', working: [[0, 1000]] },
      { id: 'ben', working: [] },
    ],
  });

describe('odds', () => {
  test('a triangular distribution, as its formula has it', () => {
    // Triangular(0.5, 1, 1.5) on 100 min: P(X <= 120) = 1 - (1.5 - 1.2)^2 / ((1.5 - 0.5)(1.5 - 1)) = 0.82; the median is 100.
    const p = problem();
    p.jobs[0]!.due = 120;
    const [job] = odds(p, plan(p, { seed: 1, evaluations: 5 }), 20_000, 5, {
      prep: { low: 0.5, likely: 1, high: 1.5 },
    });
    expect(job!.onTime).toBeGreaterThan(0.81);
    expect(job!.onTime).toBeLessThan(0.84); // ends are whole minutes: 120.49 counts as 120
    expect(job!.ends!.p50).toBeGreaterThanOrEqual(99);
    expect(job!.ends!.p50).toBeLessThanOrEqual(101);
    expect(job!.windowMissed).toBe(0);
  });

  test('without spread everything ends as planned; the same seed gives the same odds', () => {
    const p = smallShop([[prep('a')], [prep('b')]]);
    const made = plan(p, { seed: 1, evaluations: 20 });
    const ends = new Map(made.assignments.map((a) => [a.stage, a.end]));
    for (const { job, ends: got } of odds(p, made, 5, 1, {})) {
      const end = ends.get(job === 'job-1' ? 'a' : 'b')!;
      expect(got).toEqual({ p10: end, p50: end, p90: end });
    }
    const spread = { prep: { low: 0.8, likely: 1, high: 2 } };
    expect(odds(p, made, 50, 9, spread)).toEqual(odds(p, made, 50, 9, spread));
  });

  test('what is late pushes what waits for the same place and person', () => {
    const p = smallShop([[prep('a')], [prep('b')]], {
      people: [
        { id: 'ann', working: [[0, 1000]] },
        { id: 'ben', working: [] },
      ],
    });
    const made = plan(p, { seed: 1, evaluations: 20 });
    const late = odds(p, made, 3, 1, { prep: { low: 2, likely: 2, high: 2 } });
    expect(late.map((j) => j.ends!.p50).sort((x, y) => x - y)).toEqual([200, 400]);
  });

  test('a window that a delay closes counts as missed', () => {
    const bake = stage(
      'b',
      mode({ places: ['prep-2'], gap: { min: 0, max: 10, settle: 0 }, phases: [phase('bake', 20, 'onsite')] }),
    );
    const p = smallShop([[prep('a'), bake]], { open: [[0, 130]] });
    p.people[0]!.working = [[0, 1000]];
    const [job] = odds(p, plan(p, { seed: 1, evaluations: 5 }), 10, 1, { prep: { low: 1.2, likely: 1.2, high: 1.2 } });
    expect(job).toEqual({ job: 'job-1', onTime: 0, windowMissed: 1, ends: null });
  });
});
