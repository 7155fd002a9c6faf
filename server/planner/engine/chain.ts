import { NEVER } from './calendar.ts';
import { bestFit, enterBest, type Placer, takeOut } from './placer.ts';
import { ride } from './ride.ts';
import { settles } from './settles.ts';
import { ALONE, type Block, RIDES, type Variant } from './shop.ts';

/** Most placings that one block may take before it counts as not fitting. */
const MOST_STEPS = 3000;

/** The first stage that may move later when the block, with this maximum gap before it, would start too late. */
export function floorOf(p: Placer, block: Block, gapMax: number): number {
  const { shop, state } = p;
  const first = shop.jobs[block.job]!.first;
  if (gapMax >= NEVER) return block.first;
  let s = block.first;
  while (s > first && shop.fixedAt[s - 1]! < 0 && state.at.way[s - 1]?.share === ALONE) {
    s--;
    if (p.wayOf[s]!.gapMax >= NEVER) break;
  }
  return s;
}

/**
 * Places the stages of a block, each as early as it can be. A stage that would start too late after the previous one
 * takes that one out and has it placed later, as far back as the job's maximum gaps reach; what other jobs have is never
 * touched. The block's last stage must end before `limit`. Returns the stage that found no room, or -1 when all stand;
 * on failure the block's stages are out, and earlier ones may be out or moved.
 */
export function placeChain(p: Placer, block: Block, variant: Variant, limit: number): number {
  const floor = prepareChain(p, block, variant);
  return runChain(p, block, variant, limit, floor);
}

/** Sets ways and places of a block's stages and forgets older bounds. Returns the first stage that may move later. */
export function prepareChain(p: Placer, block: Block, variant: Variant): number {
  for (let s = block.first; s <= block.last; s++) {
    p.wayOf[s] = variant.ways[s - block.first]!;
    p.pinOf[s] = variant.pins[s - block.first]!;
  }
  const floor = floorOf(p, block, variant.ways[0]!.gapMax);
  p.notBefore.fill(0, floor, block.last + 1);
  p.endAtLeast.fill(0, floor, block.last + 1);
  return floor;
}

/** Places a prepared block, see `placeChain`. */
export function runChain(p: Placer, block: Block, variant: Variant, limit: number, floor: number): number {
  const { state } = p;
  let s = block.first;
  for (let steps = 0; s <= block.last; steps++) {
    if (steps > MOST_STEPS) return s;
    const inBlock = s - block.first;
    const back = placeStage(p, block, s, inBlock < 0 || limit >= NEVER ? NEVER : limit - variant.rest[inBlock]!);
    if (back === s + 1) s = back;
    else if (back < floor) return s;
    else {
      for (let k = s; k >= back; k--) if (state.at.way[k]) takeOut(p, k);
      s = back;
    }
  }
  return -1;
}

/** Sets what is asked for stage `s` from its way and its neighbours. False: it cannot be asked. */
export function setAsk(p: Placer, s: number): boolean {
  const { shop, state, ask } = p;
  const { at } = state;
  const way = p.wayOf[s]!;
  const job = shop.jobs[shop.stageJob[s]!]!;
  ask.stage = s;
  ask.way = way;
  ask.units = way.stay ? Math.max(way.units, at.units[s - 1]!) : way.units;
  ask.stayFrom = way.stay ? at.end[s - 1]! : -1;
  if (way.stay) {
    ask.place = at.place[s - 1]!;
    if (way.units > shop.placeUnits[ask.place]!) return false;
  } else if (s > job.first && shop.fixedAt[s - 1]! >= 0 && way.settle > 0 && !settles(p, s)) return false;
  ask.settle = p.letSettle[s]!;
  ask.goesOn = false;
  ask.holdUntil = 0;
  if (s === job.last) return true;
  const fixedNext = shop.fixedAt[s + 1]! >= 0;
  const next = fixedNext ? at.way[s + 1]! : p.wayOf[s + 1];
  const inBlock = fixedNext || shop.blockOf[s + 1] === shop.blockOf[s];
  if (!next || !inBlock) return true;
  ask.goesOn = next.stay;
  if (!next.stay) ask.settle = Math.max(ask.settle, next.settle);
  else if (fixedNext) ask.holdUntil = at.start[s + 1]!;
  return true;
}

/** Places one stage. Returns the stage to place next: `s + 1`, or an earlier one that has to move, or -1. */
function placeStage(p: Placer, block: Block, s: number, limit: number): number {
  const { shop, state } = p;
  const { at } = state;
  const job = shop.jobs[block.job]!;
  const way = p.wayOf[s]!;
  if (way.share === RIDES) return ride(p, s);
  const before = s > job.first;
  if (!setAsk(p, s)) return -1;
  const deadline = s < job.last && shop.fixedAt[s + 1]! >= 0 ? s + 1 : -1;
  if (deadline >= 0) {
    const onward = at.way[deadline]!;
    limit = Math.min(limit, at.start[deadline]! - onward.gapMin + 1);
    const latest = at.start[deadline]! - onward.gapMax;
    if (latest > p.endAtLeast[s]!) p.endAtLeast[s] = latest;
  }
  let from = Math.max(shop.now, p.notBefore[s]!, p.wishOf[s]!, before ? at.end[s - 1]! + way.gapMin : job.release);
  if (way.rigid) from = Math.max(from, p.endAtLeast[s]! - way.minutes);
  if (!bestFit(p, from, p.endAtLeast[s]!, limit)) return p.best.chainFrom >= 0 ? chainBack(p, s, p.best.chainFrom) : -1;
  const tooLate = before ? p.best.start - at.end[s - 1]! - way.gapMax : 0;
  if (tooLate > 0) {
    if (shop.fixedAt[s - 1]! >= 0) return -1;
    p.endAtLeast[s - 1] = p.best.start - way.gapMax;
    p.notBefore[s - 1] = at.start[s - 1]!;
    return s - 1;
  }
  enterBest(p, s);
  return s + 1;
}

/** A stay clashed with what stands in its place: the stage where the chain of stays begins has to start later. */
function chainBack(p: Placer, s: number, from: number): number {
  let head = s - 1;
  while (head > 0 && p.wayOf[head]?.stay && p.shop.fixedAt[head]! < 0) head--;
  if (p.shop.fixedAt[head]! >= 0) return -1;
  p.notBefore[head] = Math.max(p.notBefore[head]!, from);
  return head;
}
