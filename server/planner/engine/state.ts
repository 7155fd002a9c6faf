import type { Assignment } from '../types.ts';
import { BOOTH, HANDS, PAUSED, RACK, RIDES, type Shop, type Way } from './shop.ts';
import { firstEnding, insertUse, makeTrack, removeUse, type Track } from './track.ts';

/** Where each stage stands; `way[s]` is null while it has no place. Flat lists: one slot per segment, one per lamp. */
export type Placing = {
  way: (Way | null)[];
  place: Int32Array;
  person: Int32Array;
  start: Int32Array;
  end: Int32Array;
  /** The interval of its place: from the previous stage's end where it stays, until it has settled. */
  holdFrom: Int32Array;
  holdTo: Int32Array;
  /** Room that it takes: its own, or what stood there before where it stays and that was more. */
  units: Float64Array;
  /** The next stage stays, so no clean-up follows. */
  goesOn: Uint8Array;
  segFrom: Int32Array;
  segTo: Int32Array;
  lamps: Int32Array;
};

/** A schedule under construction: what is placed, and every resource's uses. */
export type State = {
  shop: Shop;
  at: Placing;
  places: Track[];
  people: Track[];
  lamps: Track[];
  circuits: Track[];
  glow: Track[];
  mist: Track[];
  /** Minutes that booths are held, and stages that stand elsewhere than in the baseline. */
  boothMinutes: number;
  moves: number;
};

export function makePlacing(shop: Shop): Placing {
  const n = shop.stageCount;
  return {
    way: new Array<Way | null>(n).fill(null),
    place: new Int32Array(n),
    person: new Int32Array(n),
    start: new Int32Array(n),
    end: new Int32Array(n),
    holdFrom: new Int32Array(n),
    holdTo: new Int32Array(n),
    units: new Float64Array(n),
    goesOn: new Uint8Array(n),
    segFrom: new Int32Array(n * shop.maxSegments),
    segTo: new Int32Array(n * shop.maxSegments),
    lamps: new Int32Array(n * shop.maxLamps),
  };
}

export function copyStage(shop: Shop, from: Placing, to: Placing, s: number): void {
  to.way[s] = from.way[s]!;
  to.place[s] = from.place[s]!;
  to.person[s] = from.person[s]!;
  to.start[s] = from.start[s]!;
  to.end[s] = from.end[s]!;
  to.holdFrom[s] = from.holdFrom[s]!;
  to.holdTo[s] = from.holdTo[s]!;
  to.units[s] = from.units[s]!;
  to.goesOn[s] = from.goesOn[s]!;
  for (let k = s * shop.maxSegments; k < (s + 1) * shop.maxSegments; k++) {
    to.segFrom[k] = from.segFrom[k]!;
    to.segTo[k] = from.segTo[k]!;
  }
  for (let k = s * shop.maxLamps; k < (s + 1) * shop.maxLamps; k++) to.lamps[k] = from.lamps[k]!;
}

const tracks = (n: number): Track[] => Array.from({ length: n }, () => makeTrack());

/** An empty schedule in which only what is fixed stands. */
export function makeState(shop: Shop): State {
  const state: State = {
    shop,
    at: makePlacing(shop),
    places: tracks(shop.placeCount),
    people: tracks(shop.personCount),
    lamps: tracks(shop.lampCount),
    circuits: tracks(shop.circuitCount),
    glow: tracks(shop.zoneCount),
    mist: tracks(shop.zoneCount),
    boothMinutes: 0,
    moves: 0,
  };
  placeFixed(state);
  return state;
}

/** Phase `k` of a placed stage starts here; for its end add the minutes, or take the segment's where it may pause. */
export function phaseFrom(state: State, s: number, way: Way, k: number): number {
  return state.at.segFrom[s * state.shop.maxSegments + way.phaseSeg[k]!]! + way.phaseOffset[k]!;
}
export function phaseTo(state: State, s: number, way: Way, k: number): number {
  const seg = way.phaseSeg[k]!;
  if (way.apart || way.segNeed[seg] === PAUSED) return state.at.segTo[s * state.shop.maxSegments + seg]!;
  return phaseFrom(state, s, way, k) + way.phaseMinutes[k]!;
}

type Edit = (t: Track, from: number, to: number, a: number, b: number) => void;

/** Applies an edit to every track that a placed stage uses. */
function eachUse(state: State, s: number, way: Way, edit: Edit): void {
  const { shop, at } = state;
  settleFixed(state, s, way, edit);
  if (way.share === RIDES) return; // the one that leads the load has it all
  const place = at.place[s]!;
  const data = shop.placeKind[place] === RACK ? at.units[s]! : way.family;
  edit(state.places[place]!, at.holdFrom[s]!, at.holdTo[s]!, data, s * 2 + at.goesOn[s]!);
  const base = s * shop.maxSegments;
  if (at.person[s]! >= 0) {
    const busy = state.people[at.person[s]!]!;
    for (let k = 0; k < way.segments; k++)
      if (way.segNeed[k] === HANDS || way.segNeed[k] === PAUSED)
        edit(busy, at.segFrom[base + k]!, at.segTo[base + k]!, 0, s);
  }
  const zone = shop.placeZone[place]!;
  if (zone >= 0 && way.firstSpray >= 0)
    edit(state.mist[zone]!, phaseFrom(state, s, way, way.firstSpray), phaseTo(state, s, way, way.lastSpray), 0, s);
  if (way.lit.length > 0) eachLampUse(state, s, way, zone, edit);
}

/** A fixed stage knows nothing of the stage after it: the minutes for which that one lets it settle are entered with it. */
function settleFixed(state: State, s: number, way: Way, edit: Edit): void {
  const { shop, at } = state;
  if (way.stay || way.settle === 0 || s === shop.jobs[shop.stageJob[s]!]!.first) return;
  if (shop.fixedAt[s]! >= 0 || shop.fixedAt[s - 1]! < 0) return;
  const before = at.way[s - 1]!;
  const data = shop.placeKind[at.place[s - 1]!] === RACK ? at.units[s - 1]! : before.family;
  edit(state.places[at.place[s - 1]!]!, at.end[s - 1]!, at.end[s - 1]! + way.settle, data, s * 2);
}

function eachLampUse(state: State, s: number, way: Way, zone: number, edit: Edit): void {
  const { shop, at } = state;
  const from = phaseFrom(state, s, way, way.lit[0]!);
  const to = phaseTo(state, s, way, way.lit[way.lit.length - 1]!);
  if (zone >= 0) edit(state.glow[zone]!, from, to, 0, s);
  for (let k = 0; k < way.lampCount; k++) {
    const lamp = at.lamps[s * shop.maxLamps + k]!;
    edit(state.lamps[lamp]!, from, to, at.place[s]!, s);
    const circuit = state.circuits[shop.lampCircuit[lamp]!]!;
    for (const p of way.lit)
      edit(circuit, phaseFrom(state, s, way, p), phaseTo(state, s, way, p), shop.lampKw[lamp]!, s);
  }
}

/** Keeps the sums that the objective weighs. */
function count(state: State, s: number, way: Way, sign: number): void {
  const { shop, at } = state;
  if (way.share !== RIDES && shop.placeKind[at.place[s]!] === BOOTH)
    state.boothMinutes += sign * (at.holdTo[s]! - at.holdFrom[s]!);
  if (shop.basePlace[s]! >= 0 && moved(state, s)) state.moves += sign;
}

/** Whether a placed stage stands elsewhere than in the baseline. */
export const moved = ({ shop, at }: State, s: number): boolean =>
  at.place[s] !== shop.basePlace[s] || at.person[s] !== shop.basePerson[s] || at.start[s] !== shop.baseStart[s];

/** Enters a stage whose slots in `at` are filled into the tracks. */
export function enter(state: State, s: number, way: Way): void {
  state.at.way[s] = way;
  eachUse(state, s, way, insertUse);
  count(state, s, way, 1);
}

/** Takes a placed stage out of the tracks. */
export function remove(state: State, s: number): void {
  const way = state.at.way[s];
  if (!way) return;
  eachUse(state, s, way, removeUse);
  count(state, s, way, -1);
  state.at.way[s] = null;
}

/**
 * Enters the fixed assignments. Where reality made two of them overlap, the later one is entered from the end of the
 * earlier: together they cover the same minutes, and tracks of exclusive resources stay in order.
 */
function placeFixed(state: State): void {
  const { shop } = state;
  const byStart = [...shop.problem.fixed].sort((x, y) => x.start - y.start || x.end - y.end);
  const stage = new Map(shop.stageIds.map((id, s) => [id, s]));
  for (const f of byStart) fillFixed(state, stage.get(f.stage)!, f);
  // Holds reach to the next stage, so every fixed stage must be filled in before any is entered.
  const leads = new Map<string, number>();
  for (const f of byStart) holdFixed(state, stage.get(f.stage)!, f.load, leads);
  for (const f of byStart) {
    const s = stage.get(f.stage)!;
    const lead = f.load === null ? s : leads.get(f.load)!;
    state.at.holdTo[s] = Math.max(state.at.holdTo[s]!, state.at.holdTo[lead]!);
    state.at.goesOn[s] = Math.max(state.at.goesOn[s]!, state.at.goesOn[lead]!);
    enterClipped(state, s, state.at.way[s]!, lead !== s);
  }
}

function fillFixed(state: State, s: number, f: Assignment): void {
  const { shop, at } = state;
  const { places, people, lamps } = shop.problem;
  const way = shop.fixedWays[shop.fixedAt[s]!]!;
  at.way[s] = way;
  at.place[s] = places.findIndex((p) => p.id === f.place);
  at.person[s] = people.findIndex((p) => p.id === f.person);
  at.start[s] = at.holdFrom[s] = f.start;
  at.end[s] = at.holdTo[s] = f.end;
  at.units[s] = way.units;
  const base = s * shop.maxSegments;
  f.phases.forEach(([from, to], k) => {
    at.segFrom[base + k] = from;
    at.segTo[base + k] = to;
  });
  f.lamps.forEach((id, k) => (at.lamps[s * shop.maxLamps + k] = lamps.findIndex((l) => l.id === id)));
}

/** How long a fixed stage holds its place. The first of its load, in `leads`, holds as long as any of them. */
function holdFixed(state: State, s: number, load: string | null, leads: Map<string, number>): void {
  const { shop, at } = state;
  const next = s + 1;
  if (s < shop.jobs[shop.stageJob[s]!]!.last && shop.fixedAt[next]! >= 0) {
    const onward = at.way[next]!;
    at.holdTo[s] = onward.stay ? Math.max(at.end[s]!, at.start[next]!) : at.end[s]! + onward.settle;
    at.goesOn[s] = onward.stay ? 1 : 0;
  }
  if (load === null) return;
  const lead = leads.get(load) ?? s;
  leads.set(load, lead);
  at.holdTo[lead] = Math.max(at.holdTo[lead]!, at.holdTo[s]!);
  at.goesOn[lead] = Math.max(at.goesOn[lead]!, at.goesOn[s]!);
}

/** Like `enter`, cutting off what exclusive tracks already hold. One that joins a load draws no current of its own. */
function enterClipped(state: State, s: number, way: Way, joins: boolean): void {
  const additive = new Set<Track>([...state.circuits, ...state.glow, ...state.mist]);
  state.places.forEach((t, p) => state.shop.placeKind[p] === RACK && additive.add(t));
  eachUse(state, s, way, (t, from, to, a, b) => {
    if (joins && state.circuits.includes(t)) return;
    if (additive.has(t)) return insertUse(t, from, to, a, b);
    let at = from;
    for (let i = firstEnding(t, at); i < t.n && t.from[i]! < to; i = firstEnding(t, at)) {
      const taken = t.from[i]!;
      const free = t.to[i]!;
      if (taken > at) insertUse(t, at, taken, a, b);
      at = free;
    }
    const inside = from === to && firstEnding(t, from) < t.n && t.from[firstEnding(t, from)]! < from;
    if (at < to || (from === to && !inside)) insertUse(t, at, to, a, b);
  });
}
