import type { Assignment, Interval, Job, Mode, Phase, Problem, Stage } from '#planner/index.ts';

/** A seeded generator (mulberry32): the same seed gives the same numbers on every machine. */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

type Dice = {
  int: (from: number, to: number) => number;
  pick: <T>(list: readonly T[]) => T;
  some: <T>(list: readonly T[]) => T[];
  chance: (p: number) => boolean;
};

function makeDice(seed: number): Dice {
  const random = seeded(seed);
  const int = (from: number, to: number): number => from + Math.floor(random() * (to - from + 1));
  const chance = (p: number): boolean => random() < p;
  return {
    int,
    chance,
    pick: (list) => list[int(0, list.length - 1)]!,
    some: (list) => {
      const some = list.filter(() => chance(0.6));
      return some.length || chance(0.03) ? some : [...list];
    },
  };
}

/** Intervals that do not overlap; now and then they touch. */
function hours(d: Dice, until: number, busy: number): Interval[] {
  const list: Interval[] = [];
  for (let at = d.int(0, 60); at < until;) {
    const end = at + d.int(10, busy);
    list.push([at, end]);
    at = end + (d.chance(0.1) ? 0 : d.int(5, 90));
  }
  return list;
}

function phasesOf(d: Dice, lampCount: number): Phase[] {
  return Array.from({ length: d.int(1, 4) }, (): Phase => {
    const kind = d.pick(['setup', 'work', 'spray', 'flash', 'purge', 'bake', 'cool'] as const);
    return {
      kind,
      minutes: d.chance(0.08) ? 0 : d.int(1, 35),
      attendance: d.pick(['hands', 'hands', 'onsite', 'none'] as const),
      lamp: lampCount > 0 && d.chance(0.6),
      wait: d.chance(0.25) ? d.int(1, 60) : 0,
    };
  });
}

function modeOf(d: Dice, p: Problem, id: string, first: boolean): Mode {
  const lampCount = d.chance(0.35) ? d.int(1, 2) : 0;
  const min = d.pick([0, 0, 5, 20]);
  const max = d.pick([null, null, min, min + 1, min + 15, min + 120, min + 600]);
  const stay = !first && d.chance(0.3);
  return {
    id,
    places: stay ? [] : d.some(p.places.map((x) => x.id)),
    stay,
    people: d.some(p.people.map((x) => x.id)),
    lamps: lampCount ? d.some(p.lamps.map((x) => x.id)) : [],
    lampCount,
    units: d.pick([1, 1, 1, 2, 3]),
    family: d.pick([null, 'primer', 'colour', 'clear']),
    load: d.pick([null, null, 'a', 'b']),
    gap: { min, max, settle: d.pick([0, 0, min, Math.floor(min / 2)]) },
    split: d.chance(0.35),
    phases: phasesOf(d, lampCount),
  };
}

function jobOf(d: Dice, p: Problem, n: number): Job {
  const id = `job-${n}`;
  const stages = Array.from({ length: d.int(1, 5) }, (_, k): Stage => {
    const modes = Array.from({ length: d.int(1, 3) }, (_x, m) => modeOf(d, p, `mode-${m}`, k === 0));
    return { id: `${id}.${k}`, kind: d.pick(['prep', 'prime', 'base', 'cure']), modes };
  });
  // Now and then the date is over before the job may begin.
  return {
    id,
    release: d.int(0, 400),
    due: d.chance(0.2) ? null : d.int(0, 900),
    weight: d.pick([1, 1, 2, 0.5, 0]),
    stages,
  };
}

/**
 * A small problem with the corners that hurt: windows without play, several lamps on a weak circuit, places closed in the
 * middle, racks with hardly any room, releases after the due date, horizons too short, people who never work.
 */
export function generateShop(seed: number): Problem {
  const d = makeDice(seed);
  const horizon = d.pick([300, 1500, 3000, 6000, 6000]);
  const p: Problem = {
    version: 1,
    origin: '2026-03-02T00:00:00Z',
    now: d.pick([0, 0, 50]),
    horizon,
    open: hours(d, horizon, 500),
    purge: d.pick([0, 3, 10]),
    lampMove: d.pick([0, 5, 20]),
    cleanups: [
      { from: 'primer', to: 'colour', minutes: 15 },
      { from: 'colour', to: 'primer', minutes: 10 },
      { from: 'clear', to: 'clear', minutes: 5 },
    ],
    places: [],
    lamps: [],
    circuits: [
      { id: 'circuit-1', kw: d.pick([6, 9, 13]) },
      { id: 'circuit-2', kw: d.pick([3, 13]) },
    ],
    people: [],
    jobs: [],
    fixed: [],
    baseline: [],
    objective: {
      tardiness: 1,
      flow: 0.01,
      makespan: d.pick([0, 0.1]),
      booth: 0.02,
      moves: d.pick([0, 5]),
      unplaced: 1e5,
    },
  };
  for (const kind of ['booth', 'booth', 'prep', 'prep', 'rack'] as const)
    if (p.places.length === 0 || d.chance(0.8))
      p.places.push({
        id: `place-${p.places.length}`,
        kind,
        zone: d.pick([null, 'north', 'south']),
        units: d.int(2, 4),
        closed: d.chance(0.5) ? [[d.int(50, 200), d.int(201, 400)]] : [],
      });
  for (let l = 0; l < d.int(1, 4); l++)
    p.lamps.push({
      id: `lamp-${l}`,
      kw: d.pick([3, 4.5, 6]),
      circuit: d.pick(p.circuits).id,
      closed: d.chance(0.2) ? [[100, 300]] : [],
    });
  for (let w = 0; w < d.int(1, 4); w++)
    p.people.push({ id: `person-${w}`, working: d.chance(0.1) ? [] : hours(d, horizon, 250) });
  for (let j = 0; j < d.int(1, 9); j++) p.jobs.push(jobOf(d, p, j));
  return p;
}

/**
 * Fixes some of a plan's assignments, some of them moved so that they clash with others or with the rules, as happens on
 * the floor, and makes the whole plan the baseline.
 */
export function fixSome(problem: Problem, assignments: readonly Assignment[], seed: number): Problem {
  const d = makeDice(seed);
  const fixed = assignments
    .filter(() => d.chance(0.4))
    .map((a): Assignment => {
      const late = d.chance(0.3) ? d.int(0, 60) : 0;
      const phases = a.phases.map(([from, to]): Interval => [from + late, to + late]);
      return { ...a, start: a.start + late, end: a.end + late, phases };
    });
  return { ...problem, fixed, baseline: [...assignments] };
}
