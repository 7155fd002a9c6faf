import { readFileSync } from 'node:fs';
import type { Mode, Problem } from '#planner/index.ts';

export type Classic = {
  name: string;
  jobs: number;
  machines: number;
  lb: number;
  ub: number;
  /** `[machine, minutes]`, or a list of those where there is a choice. */
  ops: ([number, number] | [number, number][])[][];
};

type File = { instances: Classic[]; no_wait?: Record<string, { best: number; how: string }> };

/** Reads `jobshop.json` or `flexible-jobshop.json` from a folder; sources stand in the files. */
export const readClassics = (folder: string, name: string): File =>
  JSON.parse(readFileSync(`${folder}/${name}`, 'utf8')) as File;

const modeOn = (machine: number, minutes: number, noWait: boolean): Mode => ({
  id: `on-${machine}`,
  places: [`machine-${machine}`],
  stay: false,
  people: [],
  lamps: [],
  lampCount: 0,
  units: 1,
  family: null,
  load: null,
  gap: { min: 0, max: noWait ? 0 : null, settle: 0 },
  split: false,
  phases: [{ kind: 'work', minutes, attendance: 'onsite' }],
});

/** A (flexible) job shop as a planning problem: places are machines, the makespan is the cost; no-wait: gaps of exactly 0. */
export function classicProblem(classic: Classic, noWait = false): Problem {
  const options = (op: Classic['ops'][number][number]): [number, number][] =>
    typeof op[0] === 'number' ? [op as [number, number]] : (op as [number, number][]);
  const total = classic.ops.flat().reduce((sum, op) => sum + Math.max(...options(op).map((o) => o[1])), 0);
  return {
    version: 1,
    origin: '2026-01-01T00:00:00Z',
    now: 0,
    horizon: 2 * total,
    open: [[0, 2 * total]],
    purge: 0,
    lampMove: 0,
    cleanups: [],
    places: Array.from({ length: classic.machines }, (_, m) => ({
      id: `machine-${m}`,
      kind: 'prep',
      zone: null,
      units: 1,
      closed: [],
    })),
    lamps: [],
    circuits: [],
    people: [],
    jobs: classic.ops.map((ops, j) => ({
      id: `job-${j}`,
      release: 0,
      due: null,
      weight: 1,
      stages: ops.map((op, k) => ({
        id: `job-${j}.${k}`,
        kind: 'operation',
        modes: options(op).map(([machine, minutes]) => modeOn(machine, minutes, noWait)),
      })),
    })),
    fixed: [],
    baseline: [],
    objective: { tardiness: 0, flow: 0, makespan: 1, booth: 0, moves: 0, unplaced: 1e6 },
  };
}
