import { checkPlan, plan, type Interval, type Problem } from '#planner/index.ts';

export type Absorbed = {
  name: string;
  /** To the first plan that keeps every rule and leaves nobody out who was not left out before; the last check included. */
  milliseconds: number;
  violations: number;
  moved: number;
  movable: number;
  unplaced: number;
};

const CLOSED_MINUTES = 120;

const cut = (list: readonly Interval[], from: number, to: number): Interval[] =>
  list.flatMap(([a, b]): Interval[] => [
    ...(a < Math.min(b, from) ? [[a, Math.min(b, from)] as const] : []),
    ...(Math.max(a, to) < b ? [[Math.max(a, to), b] as const] : []),
  ]);
const shut = <T extends { id: string; closed: Interval[] }>(list: T[], id: string, from: number, to: number): T[] =>
  list.map((one) =>
    one.id === id ? { ...one, closed: [...one.closed, [from, to] as const].sort((x, y) => x[0] - y[0]) } : one,
  );

/** What happens on the floor: the busiest booth, lamp or person of the posted plan is gone for two hours. */
function disturbed(problem: Problem): { name: string; problem: Problem }[] {
  const ahead = problem.baseline.filter((a) => a.start > problem.now);
  const next = Math.min(...ahead.map((a) => a.start));
  const [from, to] = [next, next + CLOSED_MINUTES];
  const most = (ids: readonly string[]): string => {
    const count = new Map<string, number>();
    for (const id of ids) count.set(id, (count.get(id) ?? 0) + 1);
    return [...count].sort((x, y) => y[1] - x[1])[0]?.[0] ?? '';
  };
  const booths = new Set(problem.places.filter((p) => p.kind === 'booth').map((p) => p.id));
  const soon = ahead.filter((a) => a.start < to);
  const booth = most(soon.map((a) => a.place).filter((id) => booths.has(id)));
  const lamp = most(ahead.flatMap((a) => a.lamps));
  const person = most(soon.flatMap((a) => a.person ?? []));
  return [
    { name: 'a booth breaks down', problem: { ...problem, places: shut(problem.places, booth, from, to) } },
    { name: 'a lamp is out', problem: { ...problem, lamps: shut(problem.lamps, lamp, from, to + 600) } },
    {
      name: 'somebody goes home',
      problem: {
        ...problem,
        people: problem.people.map((p) => (p.id === person ? { ...p, working: cut(p.working, from, to + 240) } : p)),
      },
    },
  ];
}

/** Plans again after each disturbance until nobody is left out who was not before, five times, the middle one told. */
export function absorbDisturbances(problem: Problem): Absorbed[] {
  const usual = plan(problem, { seed: 1, evaluations: 50 }).unplaced.length;
  return disturbed(problem).map(({ name, problem: after }) => {
    const runs = [1, 2, 3, 4, 5]
      .map((seed) => absorb(after, seed, usual))
      .sort((x, y) => x.milliseconds - y.milliseconds);
    return { name, ...runs[2]! };
  });
}

function absorb(problem: Problem, seed: number, usual: number): Omit<Absorbed, 'name'> {
  const begun = performance.now();
  let whole = false;
  const made = plan(problem, {
    seed,
    evaluations: 20_000,
    stop: () => whole,
    onProgress: ({ unplaced }) => (whole = unplaced <= usual),
  });
  const milliseconds = performance.now() - begun;
  const { violations, parts } = checkPlan(problem, made);
  const fixed = new Set(problem.fixed.map((a) => a.stage));
  const movable = problem.baseline.filter((a) => !fixed.has(a.stage)).length;
  return { milliseconds, violations: violations.length, moved: parts.moves, movable, unplaced: made.unplaced.length };
}
