import type { Attendance, Gap, Job, Mode, Phase, PhaseKind, Stage } from '../types.ts';
import {
  type Reader,
  readAmount,
  readBoolean,
  readList,
  readMinutes,
  readMinutesOrNull,
  readObject,
  readOneOf,
  readText,
  readTextOrNull,
  refuseTwice,
  refuseUnknown,
} from './reader.ts';

const KINDS: readonly PhaseKind[] = ['setup', 'work', 'spray', 'flash', 'purge', 'bake', 'cool'];
const ATTENDANCE: readonly Attendance[] = ['hands', 'onsite', 'none'];

/** Ids that modes may name. */
export type Known = { places: Set<string>; people: Set<string>; lamps: Set<string> };

export function readJob(r: Reader, value: unknown, path: string, known: Known): Job {
  const f = readObject(r, value, path);
  const stages = readList(r, f.stages, `${path}.stages`, (x, p) => readStage(r, x, p, known), true);
  if (Array.isArray(f.stages) && !stages.length) r.fault(`${path}.stages`, 'must not be empty');
  return {
    id: readText(r, f.id, `${path}.id`),
    release: readMinutes(r, f.release, `${path}.release`, 0),
    due: readMinutesOrNull(r, f.due, `${path}.due`),
    weight: readAmount(r, f.weight, `${path}.weight`, 1),
    stages,
  };
}

function readStage(r: Reader, value: unknown, path: string, known: Known): Stage {
  const f = readObject(r, value, path);
  const modes = readList(r, f.modes, `${path}.modes`, (x, p) => readMode(r, x, p, known), true);
  if (Array.isArray(f.modes) && !modes.length) r.fault(`${path}.modes`, 'must not be empty');
  refuseTwice(
    r,
    modes.map((m) => m.id),
    `${path}.modes`,
  );
  return {
    id: readText(r, f.id, `${path}.id`),
    kind: f.kind === undefined ? '' : readText(r, f.kind, `${path}.kind`),
    modes,
  };
}

function readMode(r: Reader, value: unknown, path: string, known: Known): Mode {
  const f = readObject(r, value, path);
  const ids = (key: 'places' | 'people' | 'lamps', noun: string): string[] =>
    readList(r, f[key], `${path}.${key}`, (x, p) => {
      const id = readText(r, x, p);
      refuseUnknown(r, id, known[key], p, noun);
      return id;
    });
  const phases = readList(r, f.phases, `${path}.phases`, (x, p) => readPhase(r, x, p), true);
  if (Array.isArray(f.phases) && !phases.length) r.fault(`${path}.phases`, 'must not be empty');
  const lampCount = readMinutes(r, f.lampCount, `${path}.lampCount`, 0);
  if (!lampCount && phases.some((p) => p.lamp)) r.fault(`${path}.phases`, 'need a lamp, but lampCount is 0');
  return {
    id: readText(r, f.id, `${path}.id`),
    places: [...new Set(ids('places', 'place'))],
    stay: readBoolean(r, f.stay, `${path}.stay`),
    people: [...new Set(ids('people', 'person'))],
    lamps: [...new Set(ids('lamps', 'lamp'))],
    lampCount,
    units: readAmount(r, f.units, `${path}.units`, 1),
    family: readTextOrNull(r, f.family, `${path}.family`),
    load: readTextOrNull(r, f.load, `${path}.load`),
    gap: readGap(r, f.gap, `${path}.gap`),
    split: readBoolean(r, f.split, `${path}.split`),
    phases,
  };
}

function readGap(r: Reader, value: unknown, path: string): Gap {
  const f = value === undefined || value === null ? {} : readObject(r, value, path);
  const gap = {
    min: readMinutes(r, f.min, `${path}.min`, 0),
    max: readMinutesOrNull(r, f.max, `${path}.max`),
    settle: readMinutes(r, f.settle, `${path}.settle`, 0),
  };
  if (gap.max !== null && gap.max < gap.min)
    r.fault(path, `can never be met: max ${gap.max} is less than min ${gap.min}`);
  if (gap.settle > gap.min) r.fault(`${path}.settle`, `must not be more than min ${gap.min}, is ${gap.settle}`);
  return gap;
}

function readPhase(r: Reader, value: unknown, path: string): Phase {
  const f = readObject(r, value, path);
  return {
    kind: readOneOf(r, f.kind, `${path}.kind`, KINDS),
    minutes: readMinutes(r, f.minutes, `${path}.minutes`),
    attendance: readOneOf(r, f.attendance, `${path}.attendance`, ATTENDANCE),
    lamp: readBoolean(r, f.lamp, `${path}.lamp`),
    wait: readMinutes(r, f.wait, `${path}.wait`, 0),
  };
}
