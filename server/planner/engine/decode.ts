import { NEVER } from './calendar.ts';
import { placeChain } from './chain.ts';
import { keepBefore, keepThis, lowest, putBack, takeKept } from './keep.ts';
import { makeParty, type Party } from './party.ts';
import { makePlacer, type Placer, takeOut } from './placer.ts';
import { makeRing, type Ring } from './ring.ts';
import { type Block, BOOTH, type Shop } from './shop.ts';

/** A placer with what a whole schedule needs: which jobs are out, which variant each block takes, and the cost so far. */
export type Decoder = Placer & {
  /** Variant of each block; -1: try all and take the one that ends first. */
  choice: Int32Array;
  /** Which blocks run as one load. */
  ring: Ring;
  party: Party;
  /** Per job: 1 where it found no room. */
  out: Uint8Array;
  /** Per job the stage that found no room. */
  outStage: Int32Array;
};

export function makeDecoder(shop: Shop): Decoder {
  return {
    ...makePlacer(shop),
    choice: new Int32Array(shop.blocks.length).fill(-1),
    ring: makeRing(shop.blocks.length),
    party: makeParty(shop),
    out: new Uint8Array(shop.jobs.length),
    outStage: new Int32Array(shop.jobs.length).fill(-1),
  };
}

/** Lists a job as unplaced: all that is not fixed of it leaves the schedule. */
export function leaveOut(d: Decoder, job: number, stage: number): void {
  const { first, last } = d.shop.jobs[job]!;
  for (let s = first; s <= last; s++) if (d.shop.fixedAt[s]! < 0 && d.state.at.way[s]) takeOut(d, s);
  d.out[job] = 1;
  d.outStage[job] = stage;
}

/** What became of a block: it stands, its job found no room and is out, or it cannot end before the limit. */
export const STANDS = 0;
export const IS_OUT = 1;
export const TOO_LATE = 2;

/** Places the next block of a job so that it ends before `limit`; NEVER: where there is no room, the job is left out. */
export function decodeBlock(d: Decoder, id: number, limit: number): number {
  const block = d.shop.blocks[id]!;
  const floor = lowest(d, block);
  const chosen = d.choice[id]!;
  const variant = chosen >= 0 ? block.variants[chosen] : undefined;
  if (variant) {
    keepBefore(d, block, floor);
    if (placeChain(d, block, variant, limit) < 0) return STANDS;
    if (limit < NEVER) return TOO_LATE;
    putBack(d, block, floor);
  }
  const failed = placeBest(d, block, floor, limit);
  if (failed < 0) return STANDS;
  if (limit < NEVER) return TOO_LATE;
  leaveOut(d, block.job, failed);
  return IS_OUT;
}

/** Minutes of booth that the placed stages of a block take. */
function boothMinutes(d: Decoder, block: Block): number {
  const { at } = d.state;
  let sum = 0;
  for (let s = block.first; s <= block.last; s++)
    if (d.shop.placeKind[at.place[s]!] === BOOTH) sum += at.holdTo[s]! - at.holdFrom[s]!;
  return sum;
}

/** Tries each variant; the earliest end wins, of equals the one that takes less booth. Returns the stage without room, or -1. */
function placeBest(d: Decoder, block: Block, floor: number, limit: number): number {
  if (block.variants.length === 0) return firstImpossible(d.shop, block);
  const only = block.variants.length === 1;
  let best = -1;
  let bestEnd = limit - 1;
  let bestBooth = 0;
  let failed = block.first;
  keepBefore(d, block, floor);
  for (let v = 0; v < block.variants.length; v++) {
    const stuck = placeChain(d, block, block.variants[v]!, limit >= NEVER && best < 0 ? NEVER : bestEnd + 1);
    if (only && stuck < 0) {
      d.choice[block.id] = 0;
      return -1;
    }
    if (stuck >= 0) failed = Math.max(failed, stuck);
    else {
      const end = d.state.at.end[block.last]!;
      const booth = boothMinutes(d, block);
      if (best < 0 || end < bestEnd || booth < bestBooth) {
        best = v;
        bestEnd = end;
        bestBooth = booth;
        keepThis(d, block, floor);
      }
    }
    putBack(d, block, floor);
  }
  if (best < 0) return failed;
  d.choice[block.id] = best;
  takeKept(d, block, floor, block.variants[best]!);
  return -1;
}

/** The first stage of a block that no way can do at all. */
function firstImpossible(shop: Shop, block: Block): number {
  for (let s = block.first; s <= block.last; s++) {
    const some = shop.ways[s]!.some(
      (w) => (w.stay || w.places.length > 0) && w.lamps.length >= w.lampCount && (!w.hands || w.people.length > 0),
    );
    if (!some) return s;
  }
  return block.first;
}
