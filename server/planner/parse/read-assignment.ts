import type { Assignment, Mode } from '../types.ts';
import type { Known } from './read-job.ts';
import {
  type Reader,
  readInterval,
  readList,
  readMinutes,
  readObject,
  readText,
  readTextOrNull,
  refuseUnknown,
} from './reader.ts';

/** Stages by id with the modes that their assignments may name. */
export type KnownStages = Map<string, readonly Mode[]>;

/** Something already assigned: `fixed` in full; of the `baseline` only stage, place, person and start count. */
export function readAssignment(
  r: Reader,
  value: unknown,
  path: string,
  known: Known,
  stages: KnownStages,
  whole: boolean,
): Assignment {
  const f = readObject(r, value, path);
  const start = readMinutes(r, f.start, `${path}.start`);
  const a: Assignment = {
    stage: readText(r, f.stage, `${path}.stage`),
    mode: whole || f.mode !== undefined ? readText(r, f.mode, `${path}.mode`) : '',
    place: readText(r, f.place, `${path}.place`),
    person: readTextOrNull(r, f.person, `${path}.person`),
    lamps: readList(r, f.lamps, `${path}.lamps`, (x, p) => readText(r, x, p)),
    load: readTextOrNull(r, f.load, `${path}.load`),
    start,
    end: readMinutes(r, f.end, `${path}.end`, whole ? undefined : start),
    phases: readList(r, f.phases, `${path}.phases`, (x, p) => readInterval(r, x, p, true), whole),
  };
  refuseUnknown(r, a.stage, stages, `${path}.stage`, 'stage');
  refuseUnknown(r, a.place, known.places, `${path}.place`, 'place');
  refuseUnknown(r, a.person, known.people, `${path}.person`, 'person');
  a.lamps.forEach((l, i) => refuseUnknown(r, l, known.lamps, `${path}.lamps[${i}]`, 'lamp'));
  if (whole) checkShape(r, a, path, stages);
  return a;
}

function checkShape(r: Reader, a: Assignment, path: string, stages: KnownStages): void {
  if (a.end < a.start) r.fault(path, `must not end before it starts, is [${a.start}, ${a.end}]`);
  const modes = stages.get(a.stage);
  const mode = modes?.find((m) => m.id === a.mode);
  if (modes && !mode && a.mode !== '') r.fault(`${path}.mode`, `names an unknown mode ${JSON.stringify(a.mode)}`);
  if (mode && mode.phases.length !== a.phases.length)
    r.fault(`${path}.phases`, `must be ${mode.phases.length} as in its mode, are ${a.phases.length}`);
  const first = a.phases[0];
  const last = a.phases[a.phases.length - 1];
  if (first && last && (first[0] !== a.start || last[1] !== a.end))
    r.fault(path, 'must start with its first phase and end with its last');
  a.phases.forEach((phase, k) => {
    const before = a.phases[k - 1];
    if (before && phase[0] < before[1])
      r.fault(`${path}.phases[${k}]`, 'must not start before the phase before it ends');
  });
}
