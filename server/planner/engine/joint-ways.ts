import type { Gap, Mode, Phase, PhaseKind } from '../types.ts';
import { LEADS, RIDES, type Shop, type Way } from './shop.ts';
import { compileWay, type Indexes } from './ways.ts';

/** Ways of whole loads, made when first asked for and kept: the search asks for the same pairs again and again. */
export type Joints = {
  indexes: Indexes;
  nextId: number;
  /** By the ids of two ways; null where they cannot run together. */
  pairs: Map<number, Way | null>;
  /** By the ids of a load's way and of the member's own. */
  riders: Map<number, Way>;
};

export const makeJoints = (indexes: Indexes, nextId: number): Joints => ({
  indexes,
  nextId,
  pairs: new Map(),
  riders: new Map(),
});

/** Two ids below 2^26 as one number. */
const keyOf = (a: Way, b: Way): number => a.id * 0x4000000 + b.id;

/** The way of two stages in one load, `a` (a stage's own way, or a load's) holding place, person and lamps; null: never together. */
export function jointWay(shop: Shop, a: Way, b: Way): Way | null {
  if (a.load < 0 || a.load !== b.load) return null;
  const { pairs } = shop.joints;
  const key = keyOf(a, b);
  const known = pairs.get(key);
  if (known !== undefined) return known;
  const made = makeJoint(shop, a, b);
  pairs.set(key, made);
  return made;
}

/** The way of a load whose modes are drawn for once and asked for never again; null: they cannot run together. */
export function onceJoint(shop: Shop, modes: readonly Mode[]): Way | null {
  const [first, ...others] = modes;
  const mode = others.reduce<Mode | null>((all, one) => all && jointMode(all, one), first ?? null);
  return mode && { ...compileWay(-1, mode, shop.joints.indexes), share: LEADS };
}

function makeJoint(shop: Shop, a: Way, b: Way): Way | null {
  const mode = jointMode(a.mode, b.mode);
  if (!mode) return null;
  const { joints, placeUnits } = shop;
  const places = a.places.filter((p) => b.places.includes(p) && mode.units <= placeUnits[p]!);
  const people = a.people.filter((q) => b.people.includes(q));
  const lamps = a.lamps.filter((l) => b.lamps.includes(l));
  if ((!a.stay && places.length === 0) || (a.hands && people.length === 0) || lamps.length < a.lampCount) return null;
  return { ...compileWay(joints.nextId++, mode, joints.indexes), places, people, lamps, share: LEADS };
}

const ADD_UP: ReadonlySet<PhaseKind> = new Set(['setup', 'work', 'spray']);

/** Two modes as one load (rule 5). Also families, attendance, pauses and lamps have to be the same: then one calendar serves all. */
function jointMode(a: Mode, b: Mode): Mode | null {
  if (!areAlike(a, b)) return null;
  const gap = a.stay ? jointGap(a.gap, b.gap) : a.gap; // before a load begins, each member has its own
  if (gap.max !== null && gap.min > gap.max) return null;
  return { ...a, gap, units: a.units + b.units, phases: a.phases.map((p, k) => jointPhase(p, b.phases[k]!)) };
}

const areAlike = (a: Mode, b: Mode): boolean =>
  a.load !== null &&
  a.load === b.load &&
  a.family === b.family &&
  a.stay === b.stay &&
  a.split === b.split &&
  a.lampCount === b.lampCount &&
  a.phases.length === b.phases.length &&
  a.phases.every((p, k) => alikePhases(p, b.phases[k]!));

/** Whether two ways could be one load in this place (-1: in any, or where they stay), without making its way. */
export const mayJoin = (shop: Shop, a: Way, b: Way, place: number): boolean =>
  areAlike(a.mode, b.mode) &&
  (place >= 0
    ? a.units + b.units <= shop.placeUnits[place]!
    : a.stay || a.places.some((p) => b.places.includes(p) && a.units + b.units <= shop.placeUnits[p]!));

const alikePhases = (p: Phase, q: Phase): boolean =>
  p.kind === q.kind && p.attendance === q.attendance && (p.lamp ?? false) === (q.lamp ?? false);

/** Setting up, working and spraying add up; what the chemistry sets takes the longest. */
const jointPhase = (p: Phase, q: Phase): Phase => ({
  ...p,
  minutes: ADD_UP.has(p.kind) ? p.minutes + q.minutes : Math.max(p.minutes, q.minutes),
  wait: Math.min(p.wait ?? 0, q.wait ?? 0),
});

const jointGap = (a: Gap, b: Gap): Gap => ({
  min: Math.max(a.min, b.min),
  max: a.max === null ? b.max : b.max === null ? a.max : Math.min(a.max, b.max),
  settle: Math.max(a.settle, b.settle),
});

/** A member's way beside the one that leads: the load's times, its own gap, and nothing held by it. */
export function riderWay(shop: Shop, joint: Way, own: Way): Way {
  const { joints } = shop;
  if (joint.id < 0) return besides(joint, own, -1); // made for once
  const key = keyOf(joint, own);
  const known = joints.riders.get(key);
  if (known) return known;
  const made = besides(joint, own, joints.nextId++);
  joints.riders.set(key, made);
  return made;
}

const besides = (joint: Way, own: Way, id: number): Way => ({
  ...joint,
  id,
  mode: own.mode,
  gapMin: own.gapMin,
  gapMax: own.gapMax,
  settle: own.settle,
  share: RIDES,
});
