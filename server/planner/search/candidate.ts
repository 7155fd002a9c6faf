import { NEVER } from '../engine/calendar.ts';
import { type Decoder, makeDecoder } from '../engine/decode.ts';
import { restore } from '../engine/keep.ts';
import { forgetTouched, takeOut } from '../engine/placer.ts';
import { costOf, type Ledger, makeLedger, setEnd, setOut, settleLedger } from '../engine/run-cost.ts';
import { joinRings, makeRing, type Ring, resetRing } from '../engine/ring.ts';
import type { Shop } from '../engine/shop.ts';
import { copyStage, makePlacing, type Placing } from '../engine/state.ts';
import { placeNext, reachBack } from './place-next.ts';
import { publishedVariants } from '../engine/published-variants.ts';

/** Everything that makes a schedule again: the order of blocks, and what is chosen for them. */
export type Genes = {
  order: Int32Array;
  choice: Int32Array;
  hand: Int32Array;
  spot: Int32Array;
  wish: Int32Array;
  ring: Ring;
};

/**
 * The schedule that the search stands on, and the candidate it tries. A candidate shares the front of the order with it:
 * only blocks from the first change on are taken out and placed again; if it is refused, they are put back as they stood.
 */
export type Search = {
  d: Decoder;
  ledger: Ledger;
  /** The candidate's order; equals `held.order` between tries. */
  order: Int32Array;
  /** Position of each block in `held.order`. */
  at: Int32Array;
  held: Genes;
  heldPlacing: Placing;
  heldPins: Int32Array;
  heldOut: Uint8Array;
  heldOutStage: Int32Array;
  cost: number;
  evaluations: number;
  /** Variant of each block in the published plan; -1: none. */
  published: Int32Array;
  /** Per block: 1 while what comes before its load is being placed. */
  awaited: Uint8Array;
  /** Whether ruins may bring blocks together in a load. */
  forms: boolean;
  /** Asked now and then while many blocks are placed: true gives the candidate up. */
  halt: () => boolean;
};

export function makeSearch(shop: Shop, alone: Int32Array): Search {
  const blocks = shop.blocks.length;
  const d = makeDecoder(shop);
  const search: Search = {
    d,
    ledger: makeLedger(shop, alone),
    order: new Int32Array(blocks),
    at: new Int32Array(blocks),
    held: {
      order: new Int32Array(blocks),
      choice: new Int32Array(blocks).fill(-1),
      hand: new Int32Array(shop.stageCount).fill(-1),
      spot: new Int32Array(shop.stageCount).fill(-1),
      wish: new Int32Array(shop.stageCount),
      ring: makeRing(blocks),
    },
    heldPlacing: makePlacing(shop),
    heldPins: new Int32Array(shop.stageCount).fill(-1),
    heldOut: new Uint8Array(shop.jobs.length),
    heldOutStage: new Int32Array(shop.jobs.length).fill(-1),
    cost: Infinity,
    evaluations: 0,
    published: publishedVariants(shop),
    awaited: new Uint8Array(blocks),
    forms: shop.shares,
    halt: () => false,
  };
  for (let s = 0; s < shop.stageCount; s++) copyStage(shop, d.state.at, search.heldPlacing, s);
  return search;
}

/** Earliest end of the job given what stands of it before stage `s`. */
function estimate(s: Search, job: number, stage: number): void {
  const { shop, state } = s.d;
  const { first } = shop.jobs[job]!;
  const alone = s.ledger.alone[job]!;
  const end = stage === first ? alone : Math.max(alone, state.at.end[stage - 1]! + shop.tail[stage - 1]!);
  setEnd(s.ledger, shop, job, end);
}

/** Takes out every block from position `from` on. */
function clearFrom(s: Search, from: number): void {
  for (let i = s.held.order.length - 1; i >= from; i--) clearBlock(s, s.held.order[i]!);
  settleLedger(s.ledger);
}

/** Takes out one block, of which no later one of its job stands. A job that was out may come back with its first. */
function clearBlock(s: Search, id: number): void {
  const { d } = s;
  const { job, first, last } = d.shop.blocks[id]!;
  for (let k = last; k >= first; k--) if (d.state.at.way[k]) takeOut(d, k);
  if (d.out[job] && id === d.shop.jobs[job]!.blocks[0]) d.out[job] = 0;
  if (!d.out[job]) estimate(s, job, first);
}

/** Blocks placed between two looks at the clock. */
const BREATH = 16;

/** Places the candidate's blocks from position `from` on; false as soon as its cost passes `limit`, or on a halt. */
function placeFrom(s: Search, from: number, limit: number): boolean {
  for (let i = from; i < s.order.length; i++) {
    if (!placeNext(s, s.order[i]!, limit)) return false;
    if ((i - from) % BREATH === BREATH - 1 && s.halt()) return false;
  }
  return true;
}

/**
 * Tries the order in `s.order` with the genes in the decoder, unchanged before position `from`. Accepts it if its cost
 * does not pass `limit`; otherwise everything is as before. Returns whether it was accepted.
 */
export function attempt(s: Search, from: number, limit: number): boolean {
  forgetTouched(s.d);
  s.evaluations++;
  const first = reachBack(s, from);
  clearFrom(s, first);
  if (placeFrom(s, first, limit)) {
    accept(s, first);
    return true;
  }
  refuse(s, first);
  return false;
}

/**
 * Takes some blocks out of the schedule and places them again in the order given, into what is free; everything else
 * stays where it is. A block comes with all later ones of its job, and with those of its load. Accepts like `attempt`; then the order of all blocks
 * follows their starts.
 */
export function attemptBlocks(s: Search, ids: readonly number[], limit: number): boolean {
  const { d } = s;
  forgetTouched(d);
  s.evaluations++;
  for (let i = ids.length - 1; i >= 0; i--) clearBlock(s, ids[i]!);
  settleLedger(s.ledger);
  for (const id of ids)
    if (!placeNext(s, id, limit)) {
      refuse(s, s.order.length);
      return false;
    }
  accept(s, s.order.length);
  sortByStart(s);
  return true;
}

/** Puts the order of blocks into the order of their starts; jobs that are out come last. */
export function sortByStart(s: Search): void {
  const { shop, state } = s.d;
  const { order } = s.held;
  const start = (id: number): number => {
    const { first, job } = shop.blocks[id]!;
    return s.heldOut[job] ? NEVER : state.at.start[first]!;
  };
  for (let i = 1; i < order.length; i++) {
    const id = order[i]!;
    const at = start(id);
    let k = i;
    for (; k > 0; k--) {
      const other = start(order[k - 1]!);
      if (other < at || (other === at && order[k - 1]! < id)) break;
      order[k] = order[k - 1]!;
    }
    order[k] = id;
  }
  s.order.set(order);
  for (let i = 0; i < order.length; i++) s.at[order[i]!] = i;
}

function accept(s: Search, from: number): void {
  const { d, held } = s;
  for (let i = 0; i < d.touchedCount; i++) {
    const k = d.touched[i]!;
    copyStage(d.shop, d.state.at, s.heldPlacing, k);
    s.heldPins[k] = d.pinOf[k]!;
  }
  for (let i = from; i < s.order.length; i++) {
    held.order[i] = s.order[i]!;
    s.at[s.order[i]!] = i;
  }
  held.choice.set(d.choice);
  held.hand.set(d.handOf);
  held.spot.set(d.spotOf);
  held.wish.set(d.wishOf);
  held.ring.set(d.ring);
  s.heldOut.set(d.out);
  s.heldOutStage.set(d.outStage);
  s.cost = costOf(d, s.ledger);
}

function refuse(s: Search, from: number): void {
  const { d, held } = s;
  for (let i = 0; i < d.touchedCount; i++) restore(d, d.touched[i]!, s.heldPlacing);
  for (let i = from; i < s.order.length; i++) s.order[i] = held.order[i]!;
  settleGenes(s, false);
}

/** Sets the decoder and the ledger to the schedule held, whose stages stand already. */
function settleGenes(s: Search, all: boolean): void {
  const { d, held } = s;
  const { shop } = d;
  const count = all ? shop.stageCount : d.touchedCount;
  for (let i = 0; i < count; i++) {
    const k = all ? i : d.touched[i]!;
    d.wayOf[k] = s.heldPlacing.way[k]!;
    d.pinOf[k] = s.heldPins[k]!;
  }
  d.choice.set(held.choice);
  d.handOf.set(held.hand);
  d.spotOf.set(held.spot);
  d.wishOf.set(held.wish);
  d.ring.set(held.ring);
  d.out.set(s.heldOut);
  d.outStage.set(s.heldOutStage);
  for (let j = 0; j < shop.jobs.length; j++) {
    if (d.out[j]) setOut(s.ledger, shop, j);
    else setEnd(s.ledger, shop, j, d.state.at.end[shop.jobs[j]!.last]!);
  }
  settleLedger(s.ledger);
}

/** After another schedule was stood on: order, genes and ledger follow it. */
export function settleHeld(s: Search): void {
  s.order.set(s.held.order);
  s.order.forEach((id, i) => (s.at[id] = i));
  settleGenes(s, true);
}

/** Starts over from an order: everything is placed anew, with every choice free. */
export const startFrom = (s: Search, order: Int32Array): void =>
  placeAll(s, order, () => freeGenes(s), s.d.shop.standing);

/** Places everything in an order with the genes that `choose` sets, in the loads given unless one leaves somebody out. */
export function placeAll(
  s: Search,
  order: Int32Array,
  choose: () => void,
  loads: readonly (readonly [number, number])[],
): void {
  const place = (together: typeof loads): boolean => {
    s.order.set(order);
    if (s.cost === Infinity) s.held.order.set(order);
    choose();
    for (const [a, b] of together) joinRings(s.d.ring, a, b);
    return attempt(s, 0, Infinity);
  };
  if (!place(loads) && loads.length > 0) place([]);
}

/** Leaves way, place, person, time and load of every block to the decoder. */
export function freeGenes({ d }: Search): void {
  d.choice.fill(-1);
  d.handOf.fill(-1);
  d.spotOf.fill(-1);
  d.wishOf.fill(0);
  resetRing(d.ring);
}
