import type { Assignment, Mode, Phase, Problem, Stage } from '#planner/index.ts';

/** A mode with nothing special; what a case is about is given. */
export const mode = (given: Partial<Mode> & { phases: Phase[] }): Mode => ({
  id: 'way',
  places: ['booth'],
  stay: false,
  people: [],
  lamps: [],
  lampCount: 0,
  units: 1,
  family: null,
  load: null,
  gap: { min: 0, max: null, settle: 0 },
  split: false,
  ...given,
});

export const phase = (
  kind: Phase['kind'],
  minutes: number,
  attendance: Phase['attendance'],
  more: Partial<Phase> = {},
): Phase => ({
  kind,
  minutes,
  attendance,
  ...more,
});

export const stage = (id: string, ...modes: Mode[]): Stage => ({ id, kind: id, modes });

/** One booth and two prep stations in one zone, a rack, two lamps on one circuit, two people with a break at 120. */
export function smallShop(jobs: Stage[][], more: Partial<Problem> = {}): Problem {
  return {
    version: 1,
    origin: '2026-03-02T00:00:00Z',
    now: 0,
    horizon: 1000,
    open: [[0, 600]],
    purge: 3,
    lampMove: 5,
    cleanups: [{ from: 'primer', to: 'colour', minutes: 15 }],
    places: [
      { id: 'booth', kind: 'booth', zone: 'hall', units: 4, closed: [[700, 720]] },
      { id: 'prep-1', kind: 'prep', zone: 'hall', units: 4, closed: [] },
      { id: 'prep-2', kind: 'prep', zone: null, units: 4, closed: [] },
      { id: 'rack', kind: 'rack', zone: null, units: 2, closed: [] },
    ],
    lamps: [
      { id: 'lamp-1', kw: 6, circuit: 'ring', closed: [[800, 900]] },
      { id: 'lamp-2', kw: 6, circuit: 'ring', closed: [] },
    ],
    circuits: [{ id: 'ring', kw: 10 }],
    people: [
      {
        id: 'ann',
        working: [
          [0, 120],
          [150, 600],
        ],
      },
      {
        id: 'ben',
        working: [
          [0, 120],
          [150, 600],
        ],
      },
    ],
    jobs: jobs.map((stages, j) => ({ id: `job-${j + 1}`, release: 0, due: 500, weight: 1, stages })),
    fixed: [],
    baseline: [],
    objective: { tardiness: 1, flow: 0.01, makespan: 0, booth: 0.02, moves: 0, unplaced: 1000 },
    ...more,
  };
}

/** An assignment whose phases follow back to back from `start`, with these minutes. */
export function assign(stageId: string, start: number, minutes: number[], more: Partial<Assignment> = {}): Assignment {
  let at = start;
  const phases = minutes.map((m) => [at, (at += m)] as const);
  return {
    stage: stageId,
    mode: 'way',
    place: 'booth',
    person: null,
    lamps: [],
    load: null,
    start,
    end: at,
    phases,
    ...more,
  };
}
