import type { Interval, Job, Mode, Problem } from '#planner/index.ts';

/**
 * A shop of `jobs` jobs made of a small one: its unbooked work is copied, and booths, stations, lamps and people are
 * copied in proportion, so that the work for each stays the same. Same problem and number, same result.
 */
export function growProblem(seed: Problem, jobs: number): Problem {
  const source = seed.jobs.filter((job) => job.stages.every((stage) => stage.modes.every((mode) => hasPlace(mode))));
  const copies = Math.max(1, Math.round(jobs / source.length));
  const all = (ids: readonly string[]): string[] => copy(ids, copies, (id, k) => name(id, k));
  const mode = (given: Mode): Mode => ({
    ...given,
    places: all(given.places),
    people: all(given.people),
    lamps: all(given.lamps),
  });
  const job = (given: Job, k: number): Job => ({
    ...given,
    id: name(given.id, k),
    stages: given.stages.map((stage) => ({ ...stage, id: name(stage.id, k), modes: stage.modes.map(mode) })),
  });
  const intervals = (list: Interval[]): Interval[] => list.map(([from, to]) => [from, to]);
  return {
    ...seed,
    places: copy(seed.places, copies, (place, k) => ({
      ...place,
      id: name(place.id, k),
      zone: place.zone === null ? null : name(place.zone, k),
      closed: intervals(place.closed),
    })),
    lamps: copy(seed.lamps, copies, (lamp, k) => ({ ...lamp, id: name(lamp.id, k), circuit: name(lamp.circuit, k) })),
    circuits: copy(seed.circuits, copies, (circuit, k) => ({ ...circuit, id: name(circuit.id, k) })),
    people: copy(seed.people, copies, (person, k) => ({ ...person, id: name(person.id, k) })),
    jobs: Array.from({ length: jobs }, (_, n) => job(source[n % source.length]!, Math.floor(n / source.length))),
    fixed: [],
    baseline: [],
  };
}

const hasPlace = (mode: Mode): boolean => mode.stay || mode.places.length > 0;
const name = (id: string, k: number): string => (k === 0 ? id : `${id}#${k}`);
const copy = <T, U>(list: readonly T[], copies: number, make: (item: T, k: number) => U): U[] =>
  Array.from({ length: copies }, (_, k) => list.map((item) => make(item, k))).flat();
