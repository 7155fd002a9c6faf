import type { Block, CompiledJob, Shop, Variant, Way } from './shop.ts';

/** A maximum that leaves at most this many minutes of play ties two stages into one block. */
const TIGHT = 240;
/** Most variants that a block may have; beyond it every way of every stage is still among them once. */
const MOST_VARIANTS = 32;

/** Whether stage `s` is placed together with the one before it. */
function tied(shop: Shop, s: number): boolean {
  return shop.ways[s]!.some((w) => w.stay || w.settle > 0 || w.gapMax - w.gapMin <= TIGHT);
}

/** Cuts a job's loose stages into blocks. Stages before a fixed one are tied to each other: it is their deadline. */
export function blocksOf(shop: Shop, job: CompiledJob): void {
  let deadline = false;
  const join: boolean[] = [];
  for (let s = job.last; s > job.first; s--) {
    if (shop.fixedAt[s]! >= 0) deadline = true;
    join[s] = shop.fixedAt[s]! < 0 && shop.fixedAt[s - 1]! < 0 && (deadline || tied(shop, s));
  }
  for (let s = job.first; s <= job.last; s++) {
    if (shop.fixedAt[s]! >= 0) continue;
    let last = s;
    while (last < job.last && join[last + 1]) last++;
    const id = shop.blocks.length;
    const block: Block = { id, job: shop.stageJob[s]!, first: s, last, variants: [] };
    block.variants = variantsOf(shop, block, s === job.first);
    shop.blocks.push(block);
    shop.blockOf.fill(id, s, last + 1);
    job.blocks.push(id);
    s = last;
  }
}

const usable = (shop: Shop, way: Way, first: boolean): boolean =>
  (way.stay ? !first : way.places.length > 0) &&
  (!way.hands || way.people.some((q) => shop.working[q]!.n > 0)) &&
  way.lamps.length >= way.lampCount;

function variantsOf(shop: Shop, block: Block, firstOfJob: boolean): Variant[] {
  const choices: Way[][] = [];
  for (let s = block.first; s <= block.last; s++)
    choices.push(shop.ways[s]!.filter((w) => usable(shop, w, firstOfJob && s === block.first)));
  if (choices.some((c) => c.length === 0)) return [];
  const product = choices.reduce((n, c) => n * c.length, 1);
  const combinations = product <= MOST_VARIANTS ? everyCombination(choices) : someCombinations(choices);
  return combinations.flatMap((ways) => withPins(shop, ways));
}

function everyCombination(choices: readonly Way[][]): Way[][] {
  let all: Way[][] = [[]];
  for (const list of choices) all = all.flatMap((ways) => list.map((w) => [...ways, w]));
  return all;
}

/** Too many to try each: take turns, so that each way occurs and neighbours vary. */
function someCombinations(choices: readonly Way[][]): Way[][] {
  return Array.from({ length: MOST_VARIANTS }, (_, k) =>
    choices.map((c, i) => c[(k + i * Math.floor(k / c.length)) % c.length]!),
  );
}

/** Where stages stay, the place of the first decides for all: one variant for each place that fits them all. */
function withPins(shop: Shop, ways: Way[]): Variant[] {
  let pinned: number[][] = [[]];
  ways.forEach((way, k) => {
    const heads = !way.stay && ways[k + 1]?.stay ? placesForChain(shop, ways, k) : [-1];
    pinned = pinned.flatMap((pins) => heads.map((p) => [...pins, p]));
  });
  const rest = new Int32Array(ways.length);
  for (let k = ways.length - 2; k >= 0; k--) rest[k] = rest[k + 1]! + ways[k + 1]!.gapMin + ways[k + 1]!.minutes;
  return pinned.map((pins) => ({ ways, pins: Int32Array.from(pins), rest }));
}

function placesForChain(shop: Shop, ways: readonly Way[], head: number): number[] {
  let units = 0;
  for (let k = head; k < ways.length && (k === head || ways[k]!.stay); k++) units = Math.max(units, ways[k]!.units);
  return [...ways[head]!.places].filter((p) => shop.placeUnits[p]! >= units);
}
