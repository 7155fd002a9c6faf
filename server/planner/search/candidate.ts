import { type Decoder, decodeBlock, makeDecoder, restore } from '../engine/decode.ts';
import { forgetTouched, takeOut } from '../engine/placer.ts';
import { costOf, type Ledger, makeLedger, setEnd, setOut, settleLedger } from '../engine/run-cost.ts';
import type { Shop } from '../engine/shop.ts';
import { copyStage, makePlacing, type Placing } from '../engine/state.ts';

/** Everything that makes a schedule again: the order of blocks, and what is chosen for them. */
export type Genes = { order: Int32Array; choice: Int32Array; hand: Int32Array; spot: Int32Array };

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
    },
    heldPlacing: makePlacing(shop),
    heldPins: new Int32Array(shop.stageCount).fill(-1),
    heldOut: new Uint8Array(shop.jobs.length),
    heldOutStage: new Int32Array(shop.jobs.length).fill(-1),
    cost: Infinity,
    evaluations: 0,
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
  const { d } = s;
  const { shop } = d;
  for (let i = s.held.order.length - 1; i >= from; i--) {
    const block = shop.blocks[s.held.order[i]!]!;
    const { job } = block;
    for (let k = block.last; k >= block.first; k--) if (d.state.at.way[k]) takeOut(d, k);
    if (!d.out[job]) estimate(s, job, block.first);
    else if (block.id === shop.jobs[job]!.blocks[0]) {
      d.out[job] = 0;
      estimate(s, job, block.first);
    }
  }
  settleLedger(s.ledger);
}

/** Places the candidate's blocks from position `from` on; false as soon as its cost passes `limit`. */
function placeFrom(s: Search, from: number, limit: number): boolean {
  const { d, ledger, order } = s;
  const { shop } = d;
  for (let i = from; i < order.length; i++) {
    const block = shop.blocks[order[i]!]!;
    if (d.out[block.job]) continue;
    decodeBlock(d, block.id);
    if (d.out[block.job]) setOut(ledger, shop, block.job);
    else {
      const end = d.state.at.end[block.last]! + shop.tail[block.last]!;
      if (block.last === shop.jobs[block.job]!.last || end > ledger.est[block.job]!)
        setEnd(ledger, shop, block.job, end);
    }
    if (costOf(d, ledger) > limit) return false;
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
  clearFrom(s, from);
  if (placeFrom(s, from, limit)) {
    accept(s, from);
    return true;
  }
  refuse(s, from);
  return false;
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

/** Starts over from an order with every choice free: everything is placed anew. */
export function startFrom(s: Search, order: Int32Array): void {
  s.order.set(order);
  if (s.cost === Infinity) s.held.order.set(order);
  s.d.choice.fill(-1);
  s.d.handOf.fill(-1);
  s.d.spotOf.fill(-1);
  attempt(s, 0, Infinity);
}
