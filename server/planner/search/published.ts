import { NEVER } from '../engine/calendar.ts';
import { decodeBlock, STANDS } from '../engine/decode.ts';
import { publishedOrder } from '../engine/orders.ts';
import { forgetTouched, takeOut } from '../engine/placer.ts';
import { moved } from '../engine/state.ts';
import { freeGenes, placeAll, type Search } from './candidate.ts';

/** Asks for a block what the published plan has: way, places, people, and no stage to start before. */
export function wishPublished(s: Search, id: number): void {
  const { shop, choice, spotOf, handOf, wishOf } = s.d;
  const { first, last } = shop.blocks[id]!;
  choice[id] = s.published[id]!;
  for (let k = first; k <= last; k++) {
    if (shop.basePlace[k]! < 0) continue;
    spotOf[k] = shop.basePlace[k]!;
    handOf[k] = shop.basePerson[k]!;
    wishOf[k] = shop.baseStart[k]!;
  }
}

function wishAll(s: Search): void {
  freeGenes(s);
  for (let id = 0; id < s.d.shop.blocks.length; id++) wishPublished(s, id);
}

/**
 * Places the published plan again: what stands undisturbed stands there exactly. Disturbed jobs come after it, into what
 * is free, or before it, and what they meet makes room; new jobs with them.
 */
export function placePublished(s: Search, stands: Uint8Array, disturbedFirst: boolean): void {
  const { shop } = s.d;
  const known = publishedOrder(shop);
  const of = (wanted: number): Int32Array => known.filter((id) => stands[shop.blocks[id]!.job] === wanted);
  const order = disturbedFirst ? [...of(0), ...of(1)] : [...of(1), ...of(0)];
  placeAll(s, Int32Array.from(order), () => wishAll(s), [...shop.standing, ...shop.published]);
}

/**
 * Per job 1 where all of it can stand as published beside what is fixed: nothing closed, nobody missing. Such jobs were
 * published together, so none of them disturbs another. Asked before anything else is placed.
 */
export function undisturbed(s: Search): Uint8Array {
  wishAll(s);
  return Uint8Array.from(s.d.shop.jobs, (_, j) => (standsAlone(s, j) ? 1 : 0));
}

function standsAlone(s: Search, job: number): boolean {
  const { d } = s;
  const { shop } = d;
  const { first, last, blocks } = shop.jobs[job]!;
  const placed = blocks.every((id) => decodeBlock(d, id, NEVER) === STANDS);
  let stands = placed;
  for (let k = last; k >= first; k--) {
    if (shop.fixedAt[k]! >= 0) continue;
    if (shop.basePlace[k]! < 0 || (placed && moved(d.state, k))) stands = false;
    if (d.state.at.way[k]) takeOut(d, k);
  }
  d.out[job] = 0;
  d.outStage[job] = -1;
  forgetTouched(d);
  return stands;
}
