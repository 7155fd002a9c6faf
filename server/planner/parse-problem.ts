import { type KnownStages, readAssignment } from './parse/read-assignment.ts';
import { type Known, readJob } from './parse/read-job.ts';
import {
  type Fields,
  makeReader,
  type Reader,
  readAmount,
  readIntervals,
  readList,
  readMinutes,
  readObject,
  readOneOf,
  readText,
  readTextOrNull,
  refuseTwice,
  refuseUnknown,
} from './parse/reader.ts';
import type { Circuit, Cleanup, Lamp, Objective, Person, Place, PlaceKind, Problem } from './types.ts';

const PLACE_KINDS: readonly PlaceKind[] = ['booth', 'prep', 'rack'];

/**
 * Reads a planning problem, version 1, from parsed JSON. What may be absent gets its default; everything else that is
 * not as it should be is a fault: one line each, beginning with the path of the value.
 */
export function parseProblem(json: unknown): { problem: Problem } | { faults: string[] } {
  const r = makeReader();
  if (typeof json !== 'object' || json === null || Array.isArray(json))
    return { faults: ['problem must be an object'] };
  const f = json as Fields;
  if (f.version !== 1) return { faults: [`version must be 1, is ${JSON.stringify(f.version) ?? 'missing'}`] };
  const shop = readShop(r, f);
  const known: Known = { places: ids(shop.places), people: ids(shop.people), lamps: ids(shop.lamps) };
  const jobs = readList(r, f.jobs, 'jobs', (x, p) => readJob(r, x, p, known), true);
  twice(r, jobs, 'jobs');
  const stages: KnownStages = new Map();
  jobs.forEach((job, j) =>
    job.stages.forEach((stage, k) => {
      if (stages.has(stage.id)) r.fault(`jobs[${j}].stages[${k}].id`, `repeats the id ${JSON.stringify(stage.id)}`);
      stages.set(stage.id, stage.modes);
    }),
  );
  const assignments = (key: 'fixed' | 'baseline') => {
    const list = readList(r, f[key], key, (x, p) => readAssignment(r, x, p, known, stages, key === 'fixed'));
    refuseTwice(
      r,
      list.map((a) => a.stage),
      key,
    );
    return list;
  };
  const problem: Problem = { ...shop, jobs, fixed: assignments('fixed'), baseline: assignments('baseline') };
  return r.faults.length ? { faults: r.faults } : { problem };
}

const ids = (list: readonly { id: string }[]): Set<string> => new Set(list.map((x) => x.id));

const twice = (r: Reader, list: readonly { id: string }[], path: string): void =>
  refuseTwice(
    r,
    list.map((x) => x.id),
    path,
  );

function readShop(r: Reader, f: Fields): Omit<Problem, 'jobs' | 'fixed' | 'baseline'> {
  const origin = f.origin === undefined ? '1970-01-01T00:00:00Z' : readText(r, f.origin, 'origin');
  if (origin !== '' && Number.isNaN(Date.parse(origin)))
    r.fault('origin', `must be an ISO 8601 instant, is "${origin}"`);
  const now = readMinutes(r, f.now, 'now', 0);
  const horizon = readMinutes(r, f.horizon, 'horizon');
  if (now > horizon && f.horizon !== undefined) r.fault('horizon', `must not lie before now (${now}), is ${horizon}`);
  const circuits = readList(r, f.circuits, 'circuits', (x, p) => readCircuit(r, x, p));
  const known = ids(circuits);
  const lamps = readList(r, f.lamps, 'lamps', (x, p) => readLamp(r, x, p, known));
  const places = readList(r, f.places, 'places', (x, p) => readPlace(r, x, p), true);
  const people = readList(r, f.people, 'people', (x, p) => readPerson(r, x, p));
  twice(r, circuits, 'circuits');
  twice(r, lamps, 'lamps');
  twice(r, places, 'places');
  twice(r, people, 'people');
  return {
    version: 1,
    origin,
    now,
    horizon,
    open: readIntervals(r, f.open, 'open'),
    purge: readMinutes(r, f.purge, 'purge', 0),
    lampMove: readMinutes(r, f.lampMove, 'lampMove', 0),
    cleanups: readList(r, f.cleanups, 'cleanups', (x, p) => readCleanup(r, x, p)),
    places,
    lamps,
    circuits,
    people,
    objective: readObjective(r, f.objective),
  };
}

function readCircuit(r: Reader, value: unknown, path: string): Circuit {
  const f = readObject(r, value, path);
  return { id: readText(r, f.id, `${path}.id`), kw: readAmount(r, f.kw, `${path}.kw`) };
}

function readLamp(r: Reader, value: unknown, path: string, circuits: Set<string>): Lamp {
  const f = readObject(r, value, path);
  const circuit = readText(r, f.circuit, `${path}.circuit`);
  refuseUnknown(r, circuit, circuits, `${path}.circuit`, 'circuit');
  return {
    id: readText(r, f.id, `${path}.id`),
    kw: readAmount(r, f.kw, `${path}.kw`),
    circuit,
    closed: readIntervals(r, f.closed, `${path}.closed`),
  };
}

function readPlace(r: Reader, value: unknown, path: string): Place {
  const f = readObject(r, value, path);
  return {
    id: readText(r, f.id, `${path}.id`),
    kind: readOneOf(r, f.kind, `${path}.kind`, PLACE_KINDS),
    zone: readTextOrNull(r, f.zone, `${path}.zone`),
    units: readAmount(r, f.units, `${path}.units`),
    closed: readIntervals(r, f.closed, `${path}.closed`),
  };
}

function readPerson(r: Reader, value: unknown, path: string): Person {
  const f = readObject(r, value, path);
  const working = readIntervals(r, f.working, `${path}.working`);
  const sorted = working.map((x, i) => ({ x, i })).sort((a, b) => a.x[0] - b.x[0]);
  sorted.forEach(({ x, i }, k) => {
    const before = sorted[k - 1];
    // Counted twice, a minute would do the work of two.
    if (before && x[0] < before.x[1]) r.fault(`${path}.working[${i}]`, 'overlaps the interval before it');
  });
  return { id: readText(r, f.id, `${path}.id`), working };
}

function readCleanup(r: Reader, value: unknown, path: string): Cleanup {
  const f = readObject(r, value, path);
  return {
    from: readText(r, f.from, `${path}.from`),
    to: readText(r, f.to, `${path}.to`),
    minutes: readMinutes(r, f.minutes, `${path}.minutes`),
  };
}

function readObjective(r: Reader, value: unknown): Objective {
  const f = value === undefined || value === null ? {} : readObject(r, value, 'objective');
  const weight = (key: keyof Objective): number => readAmount(r, f[key], `objective.${key}`, 0);
  return {
    tardiness: weight('tardiness'),
    flow: weight('flow'),
    makespan: weight('makespan'),
    booth: weight('booth'),
    moves: weight('moves'),
    unplaced: weight('unplaced'),
  };
}
