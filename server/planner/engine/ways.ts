import type { Mode, Phase, Problem } from '../types.ts';
import { NEVER } from './calendar.ts';
import { ALONE, HANDS, NONE, ONSITE, PAUSED, type Way } from './shop.ts';

/** Where a mode's ids stand in the compiled shop. */
export type Indexes = {
  place: Map<string, number>;
  person: Map<string, number>;
  lamp: Map<string, number>;
  family: Map<string, number>;
  load: Map<string, number>;
  placeUnits: Float64Array;
};

export const indexOf = (list: readonly { id: string }[]): Map<string, number> => new Map(list.map((x, i) => [x.id, i]));

function familiesOf(problem: Problem): Map<string, number> {
  const names = new Set(problem.cleanups.flatMap((c) => [c.from, c.to]));
  return new Map([...names].map((name, i) => [name, i]));
}

function loadsOf(problem: Problem): Map<string, number> {
  const modes = problem.jobs.flatMap((job) => job.stages.flatMap((s) => s.modes));
  return new Map([...new Set(modes.flatMap((m) => m.load ?? []))].map((key, i) => [key, i]));
}

export function indexesOf(problem: Problem): Indexes {
  return {
    place: indexOf(problem.places),
    person: indexOf(problem.people),
    lamp: indexOf(problem.lamps),
    family: familiesOf(problem),
    load: loadsOf(problem),
    placeUnits: Float64Array.from(problem.places, (p) => p.units),
  };
}

const needOf = (phase: Phase, split: boolean): number => {
  if (phase.minutes === 0 || phase.attendance === 'none') return NONE;
  if (phase.attendance === 'onsite') return ONSITE;
  return split ? PAUSED : HANDS;
};

type Segments = { minutes: number[]; need: number[]; wait: number[]; seg: number[]; offset: number[] };

/** Merges phases that follow back to back and ask the same of people. A paused phase stays alone: its length varies. */
function mergePhases(phases: readonly Phase[], split: boolean, apart: boolean): Segments {
  const s: Segments = { minutes: [], need: [], wait: [], seg: [], offset: [] };
  for (const phase of phases) {
    const need = needOf(phase, split);
    const last = s.need.length - 1;
    const joins = !apart && last >= 0 && s.wait[last] === 0 && s.need[last] === need && need !== PAUSED;
    if (!joins) {
      s.minutes.push(0);
      s.need.push(need);
      s.wait.push(0);
    }
    const at = s.need.length - 1;
    s.seg.push(at);
    s.offset.push(s.minutes[at]!);
    s.minutes[at]! += phase.minutes;
    s.wait[at] = phase.wait ?? 0;
  }
  return s;
}

const where = (list: readonly string[], index: Map<string, number>): number[] =>
  list.flatMap((id) => index.get(id) ?? []);

/** Compiles one mode. Places too small for it are left out. `apart`: no phases merged, as a fixed assignment needs. */
export function compileWay(id: number, mode: Mode, at: Indexes, apart = false): Way {
  const s = mergePhases(mode.phases, mode.split, apart);
  const indices = (wanted: (p: Phase) => boolean): number[] => mode.phases.flatMap((p, k) => (wanted(p) ? [k] : []));
  const sprays = indices((p) => p.kind === 'spray');
  return {
    id,
    stay: mode.stay,
    places: Int32Array.from(where(mode.places, at.place).filter((p) => mode.units <= at.placeUnits[p]!)),
    people: Int32Array.from(where(mode.people, at.person)),
    lamps: Int32Array.from(where(mode.lamps, at.lamp)),
    lampCount: mode.lampCount,
    units: mode.units,
    family: mode.family === null ? -1 : (at.family.get(mode.family) ?? -1),
    load: mode.load === null ? -1 : at.load.get(mode.load)!,
    gapMin: mode.gap.min,
    gapMax: mode.gap.max ?? NEVER,
    settle: mode.gap.settle,
    hands: mode.phases.some((p) => p.attendance === 'hands'),
    segments: s.need.length,
    segMinutes: Int32Array.from(s.minutes),
    segNeed: Int32Array.from(s.need),
    segWait: Int32Array.from(s.wait),
    phaseSeg: Int32Array.from(s.seg),
    phaseOffset: Int32Array.from(s.offset),
    phaseMinutes: Int32Array.from(mode.phases, (p) => p.minutes),
    lit: Int32Array.from(mode.lampCount > 0 ? indices((p) => p.lamp === true) : []),
    firstSpray: sprays[0] ?? -1,
    lastSpray: sprays[sprays.length - 1] ?? -1,
    minutes: mode.phases.reduce((sum, p) => sum + p.minutes, 0),
    rigid: s.need.every((need, k) => need !== PAUSED && (s.wait[k] === 0 || k === s.need.length - 1)),
    apart,
    mode,
    share: ALONE,
  };
}

/** Puts the least flexible first, so that a free choice leaves the sought-after ones to others. */
export function sortByDemand(ways: readonly Way[], placeCount: number, personCount: number, kw: Float64Array): void {
  const places = new Float64Array(placeCount);
  const people = new Float64Array(personCount);
  for (const way of ways) {
    for (const p of way.places) places[p]! += way.minutes / way.places.length;
    if (way.hands) for (const q of way.people) people[q]! += way.minutes / way.people.length;
  }
  for (const way of ways) {
    way.places.sort((x, y) => places[x]! - places[y]! || x - y);
    way.people.sort((x, y) => people[x]! - people[y]! || x - y);
    way.lamps.sort((x, y) => kw[x]! - kw[y]! || x - y);
  }
}
