import type { Interval, Job, Mode, Phase, Problem, Stage } from '#planner/index.ts';
import { seeded } from './generate-shop.ts';

type Dice = {
  int: (from: number, to: number) => number;
  pick: <T>(list: readonly T[]) => T;
  chance: (p: number) => boolean;
};

function makeDice(seed: number): Dice {
  const random = seeded(seed);
  const int = (from: number, to: number): number => from + Math.floor(random() * (to - from + 1));
  return { int, pick: (list) => list[int(0, list.length - 1)]!, chance: (p) => random() < p };
}

type Template = { kind: string; load: string; family: string | null; phases: (d: Dice) => Phase[]; lamps: number };

const hands = (kind: Phase['kind'], minutes: number, wait = 0): Phase => ({ kind, minutes, attendance: 'hands', wait });
const by = (kind: Phase['kind'], minutes: number, attendance: 'onsite' | 'none', lamp = false): Phase => ({
  kind,
  minutes,
  attendance,
  lamp,
});

const SPRAY: Template = {
  kind: 'base',
  load: 'spray',
  family: 'colour',
  lamps: 0,
  phases: (d) => [
    hands('setup', d.pick([0, 5, 10])),
    hands('spray', d.int(2, 8)),
    hands('flash', d.int(5, 12), d.pick([0, 0, 10])),
    hands('spray', d.int(2, 8)),
  ],
};
const CLEAR: Template = { ...SPRAY, kind: 'clear', load: 'clear', phases: (d) => [hands('spray', d.int(3, 9))] };
const BAKE: Template = {
  kind: 'bake',
  load: 'bake',
  family: 'colour',
  lamps: 0,
  phases: (d) => [
    by('purge', d.int(3, 6), 'none'),
    by('bake', d.int(15, 40), 'onsite'),
    by('cool', d.int(5, 15), 'none'),
  ],
};
const LAMP: Template = {
  kind: 'lamp',
  load: 'lamp',
  family: null,
  lamps: 1,
  phases: (d) => [by('bake', d.int(10, 25), 'onsite', true), by('cool', d.int(0, 10), 'none')],
};
const WIPE: Template = {
  kind: 'wipe',
  load: 'wipe',
  family: null,
  lamps: 0,
  phases: (d) => [hands('work', d.int(3, 15))],
};

function modeOf(d: Dice, p: Problem, t: Template, stay: boolean, id: string): Mode {
  const min = d.pick([0, 0, 10]);
  const fits = (kind: string): boolean =>
    t === WIPE || (t === LAMP) !== (kind === 'booth') ? d.chance(0.93) : d.chance(0.1);
  const places = p.places.filter(({ kind }) => fits(kind)).map((x) => x.id);
  return {
    id,
    places: stay ? [] : places.length ? places : ['booth-1'],
    stay,
    people: p.people.filter(() => d.chance(0.9)).map((x) => x.id),
    lamps: t.lamps ? p.lamps.map((x) => x.id) : [],
    lampCount: t.lamps,
    units: d.pick([1, 1, 1, 2]),
    family: d.chance(0.05) ? 'primer' : t.family,
    load: d.chance(0.06) ? null : t.load,
    gap: { min, max: d.pick([null, min + 15, min + 60, min + 240, min + 700]), settle: d.pick([0, min]) },
    split: t === WIPE && d.chance(0.7),
    phases: t.phases(d),
  };
}

/** A chain as it happens: wiped, sprayed, cleared where it stands, cured there or elsewhere, wiped again; parts of it left out. */
function jobOf(d: Dice, p: Problem, n: number): Job {
  const id = `job-${n}`;
  const stages: Stage[] = [];
  const add = (t: Template, ways: boolean[]): void => {
    const modes = ways.map((stay, k) => modeOf(d, p, t, stay && stages.length > 0, `way-${k}`));
    stages.push({ id: `${id}.${stages.length}`, kind: t.kind, modes });
  };
  if (d.chance(0.6)) add(WIPE, [false]);
  add(SPRAY, d.chance(0.15) ? [false, false] : [false]);
  if (d.chance(0.8)) add(CLEAR, [true]);
  if (d.chance(0.7)) {
    add(BAKE, d.chance(0.5) ? [true, false] : [true]);
    if (d.chance(0.5)) {
      const lamp = { ...modeOf(d, p, LAMP, false, 'lamp') };
      stages.at(-1)!.modes.push(lamp);
    }
  }
  if (d.chance(0.3)) add(SPRAY, [false]);
  if (d.chance(0.6)) add(WIPE, [false]);
  return {
    id,
    release: d.pick([0, 0, 30, 120]),
    due: d.chance(0.2) ? null : d.int(150, 700),
    weight: d.pick([1, 1, 2, 3]),
    stages,
  };
}

function hours(d: Dice, until: number): Interval[] {
  const list: Interval[] = [];
  for (let at = d.int(0, 40); at < until;) {
    const end = at + d.int(60, 400);
    list.push([at, end]);
    at = end + d.int(10, 60);
  }
  return list;
}

/** A small shop whose parts could often, and sometimes just not, share a run: other units, families, kinds, gaps, people, places. */
export function generateLoads(seed: number): Problem {
  const d = makeDice(seed);
  const horizon = d.pick([2500, 5000]);
  const places = ['booth', 'booth', 'prep', 'rack'] as const;
  const p: Problem = {
    version: 1,
    origin: '2026-03-02T00:00:00Z',
    now: d.pick([0, 30]),
    horizon,
    open: hours(d, horizon),
    purge: 3,
    lampMove: 5,
    cleanups: [
      { from: 'primer', to: 'colour', minutes: 15 },
      { from: 'colour', to: 'primer', minutes: 10 },
      { from: 'colour', to: 'colour', minutes: d.pick([0, 5]) },
    ],
    places: places.flatMap((kind, i) =>
      i > 0 && d.chance(0.3)
        ? []
        : [
            {
              id: `${kind}-${i + 1}`,
              kind,
              zone: d.pick([null, 'hall']),
              units: d.int(3, 6),
              closed: d.chance(0.2) ? [[200, 230]] : [],
            },
          ],
    ),
    lamps: [1, 2].map((n) => ({ id: `lamp-${n}`, kw: 6, circuit: 'ring', closed: [] })),
    circuits: [{ id: 'ring', kw: d.pick([7, 13]) }],
    people: Array.from({ length: d.int(1, 3) }, (_, n) => ({ id: `person-${n}`, working: hours(d, horizon) })),
    jobs: [],
    fixed: [],
    baseline: [],
    objective: {
      tardiness: 1,
      flow: 0.05,
      makespan: d.pick([0, 0.1]),
      booth: 0.1,
      moves: d.pick([0, 5]),
      unplaced: 1e5,
    },
  };
  const jobs = d.int(3, 9);
  for (let j = 0; j < jobs; j++) p.jobs.push(jobOf(d, p, j));
  return p;
}
