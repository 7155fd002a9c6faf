import { NEVER } from './calendar.ts';
import { type Ask, type Fit, fitFrom, laySegments, makeFit } from './fit.ts';
import { RACK, type Shop, type Way } from './shop.ts';
import { enter, makePlacing, makeState, type Placing, remove, type State } from './state.ts';
import { firstEnding } from './track.ts';

/** A state with the working memory for placing stages into it; made once, so that the search allocates nothing. */
export type Placer = {
  shop: Shop;
  state: State;
  /** The way that each stage has or had last, and the place it is bound to (-1: free to choose). */
  wayOf: (Way | null)[];
  pinOf: Int32Array;
  /** Person and place that the search binds each stage to (-1: free to choose). */
  handOf: Int32Array;
  spotOf: Int32Array;
  /** Minute before which the search wants a stage not to start, so that it stays where it was published. */
  wishOf: Int32Array;
  notBefore: Int32Array;
  endAtLeast: Int32Array;
  /** Per stage that rides in a load: the stage that leads it. */
  leadOf: Int32Array;
  /** Minutes that the members of a load ask for to settle, at the last stage they share; 0 elsewhere. */
  letSettle: Int32Array;
  /** Why a stage could not ride: its leader's stage has to start and to end this late. -1: for another reason. */
  wants: { lead: number; start: number; end: number };
  ask: Ask;
  fit: Fit;
  best: Fit;
  bestPlace: number;
  bestPerson: number;
  placeFree: Int32Array;
  /** Stages whose placing has changed since the mark was raised. */
  touched: Int32Array;
  touchedCount: number;
  touchMark: Int32Array;
  mark: number;
  /** Scratch for the best variant of a block, and for what stood before one was tried. */
  kept: Placing;
  before: Placing;
  keptPins: Int32Array;
};

export function makePlacer(shop: Shop): Placer {
  const n = shop.stageCount;
  const anyWay = shop.ways[0]?.[0] as Way;
  return {
    shop,
    state: makeState(shop),
    wayOf: new Array<Way | null>(n).fill(null),
    pinOf: new Int32Array(n).fill(-1),
    handOf: new Int32Array(n).fill(-1),
    spotOf: new Int32Array(n).fill(-1),
    wishOf: new Int32Array(n),
    notBefore: new Int32Array(n),
    endAtLeast: new Int32Array(n),
    leadOf: new Int32Array(n).fill(-1),
    letSettle: new Int32Array(n),
    wants: { lead: -1, start: 0, end: 0 },
    ask: {
      stage: 0,
      way: anyWay,
      place: 0,
      person: -1,
      units: 0,
      stayFrom: -1,
      settle: 0,
      holdUntil: 0,
      goesOn: false,
    },
    fit: makeFit(shop.maxSegments, shop.maxLamps),
    best: makeFit(shop.maxSegments, shop.maxLamps),
    bestPlace: -1,
    bestPerson: -1,
    placeFree: new Int32Array(shop.placeCount),
    touched: new Int32Array(n),
    touchedCount: 0,
    touchMark: new Int32Array(n),
    mark: 1,
    kept: makePlacing(shop),
    before: makePlacing(shop),
    keptPins: new Int32Array(n),
  };
}

/** Notes that a stage's placing is about to change. */
export function touch(p: Placer, s: number): void {
  if (p.touchMark[s] === p.mark) return;
  p.touchMark[s] = p.mark;
  p.touched[p.touchedCount++] = s;
}

export function forgetTouched(p: Placer): void {
  p.mark++;
  p.touchedCount = 0;
}

export function takeOut(p: Placer, s: number): void {
  touch(p, s);
  remove(p.state, s);
}

function keepBest(p: Placer, place: number, person: number): void {
  const { fit } = p;
  p.fit = p.best;
  p.best = fit;
  p.bestPlace = place;
  p.bestPerson = person;
}

/** Tries one place and person from `at` on; a start so early that it ends before `needEnd` is moved on. */
function tryOne(p: Placer, place: number, person: number, at: number, needEnd: number, limit: number): boolean {
  p.ask.place = place;
  p.ask.person = person;
  let from = at;
  for (;;) {
    if (!fitFrom(p.state, p.ask, from, limit, p.fit)) return false;
    if (p.fit.end >= needEnd) return true;
    from = p.fit.start + needEnd - p.fit.end;
  }
}

/**
 * The earliest end of stage `s` over its places and people, from `at` on and before `limit`; of equals the least
 * flexible. The ask's way, settle and stay are set by the caller. The answer is in `best`.
 */
export function bestFit(p: Placer, at: number, needEnd: number, limit: number): boolean {
  const { ask } = p;
  const { way, stage } = ask;
  // The search's wishes count as far as the way knows them; a chain's place is part of the variant.
  const spot = p.spotOf[stage]!;
  const pin = p.pinOf[stage]! >= 0 ? p.pinOf[stage]! : spot >= 0 && way.places.includes(spot) ? spot : -1;
  const asked = p.handOf[stage]!;
  const hand = asked >= 0 && way.people.includes(asked) ? asked : -1;
  let bestEnd = limit;
  p.bestPlace = -1;
  let chainFrom = NEVER;
  const hands = way.hands ? (hand >= 0 ? 1 : way.people.length) : 1;
  const spots = ask.stayFrom >= 0 || pin >= 0 ? 1 : way.places.length;
  const many = hands > 1 && spots > 1;
  if (many) p.placeFree.fill(0);
  for (let q = 0; q < hands; q++) {
    const person = way.hands ? (hand >= 0 ? hand : way.people[q]!) : -1;
    let from = at;
    if (hands > 1) {
      from = laySegments(p.state, way, person, at, p.fit);
      if (from >= NEVER || p.fit.end >= bestEnd) continue;
    }
    for (let k = 0; k < spots; k++) {
      const place = ask.stayFrom >= 0 ? ask.place : pin >= 0 ? pin : way.places[k]!;
      let start = from;
      if (many) {
        start = Math.max(from, placeFreeFrom(p, place, at));
        if (start + way.minutes >= bestEnd) continue;
      }
      if (tryOne(p, place, person, start, needEnd, bestEnd)) {
        bestEnd = p.fit.end;
        keepBest(p, place, person);
        if (bestEnd <= Math.max(at + way.minutes, needEnd)) return true; // nothing can end earlier
      } else if (p.fit.chainFrom >= 0 && p.fit.chainFrom < chainFrom) chainFrom = p.fit.chainFrom;
    }
  }
  p.best.chainFrom = p.bestPlace < 0 && chainFrom < NEVER ? chainFrom : -1;
  return p.bestPlace >= 0;
}

/** A minute before which the way cannot begin in the place, whoever does it; found once per ask. */
function placeFreeFrom(p: Placer, place: number, at: number): number {
  const known = p.placeFree[place]!;
  if (known > 0) return known;
  const { shop, state, ask } = p;
  let free = at;
  if (shop.placeKind[place] !== RACK) {
    const track = state.places[place]!;
    const i = firstEnding(track, at);
    if (i < track.n && track.from[i]! < at + Math.max(1, ask.way.minutes)) free = track.to[i]!;
  }
  p.placeFree[place] = free;
  return free;
}

/** Enters the best fit of stage `s` into the state. */
export function enterBest(p: Placer, s: number): void {
  const { shop, state, ask, best } = p;
  const { at } = state;
  touch(p, s);
  at.place[s] = p.bestPlace;
  at.person[s] = p.bestPerson;
  at.start[s] = best.start;
  at.end[s] = best.end;
  at.holdFrom[s] = ask.stayFrom >= 0 ? ask.stayFrom : best.start;
  at.holdTo[s] = Math.max(best.end + ask.settle, ask.holdUntil);
  at.units[s] = ask.units;
  at.goesOn[s] = ask.goesOn ? 1 : 0;
  const base = s * shop.maxSegments;
  for (let k = 0; k < ask.way.segments; k++) {
    at.segFrom[base + k] = best.segFrom[k]!;
    at.segTo[base + k] = best.segTo[k]!;
  }
  for (let k = 0; k < ask.way.lampCount; k++) at.lamps[s * shop.maxLamps + k] = best.lamps[k]!;
  p.wayOf[s] = ask.way;
  enter(state, s, ask.way);
}
