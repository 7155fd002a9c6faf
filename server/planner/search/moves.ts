import { leaveRing } from '../engine/ring.ts';
import { below, type Random } from '../random.ts';
import type { Shop } from '../engine/shop.ts';
import { moved } from '../engine/state.ts';
import type { Search } from './candidate.ts';
import { wishPublished } from './published.ts';
import { type Cut, shareRuns } from './share-runs.ts';

/** Changes `s.order` or the genes in the decoder. Returns the first changed position, or -1 where nothing changed. */
export type Move = (s: Search, random: Random) => number;

/** Moves the block at position `from` to `to`, shifting those between. Returns the first changed position. */
function shift(order: Int32Array, from: number, to: number): number {
  const id = order[from]!;
  if (from < to) order.copyWithin(from, from + 1, to + 1);
  else order.copyWithin(to + 1, to, from);
  order[to] = id;
  return Math.min(from, to);
}

/** The positions between which a block may stand: after its job's previous block, before the next. */
function range(s: Search, id: number): [number, number] {
  const { blocks } = s.d.shop.jobs[s.d.shop.blocks[id]!.job]!;
  const k = id - blocks[0]!; // a job's blocks are numbered in order
  const lo = k > 0 ? s.at[blocks[k - 1]!]! + 1 : 0;
  const hi = k < blocks.length - 1 ? s.at[blocks[k + 1]!]! - 1 : s.order.length - 1;
  return [lo, hi];
}

/** One block to another position, mostly near. */
export const moveBlock: Move = (s, random) => {
  const from = below(random, s.order.length);
  const id = s.order[from]!;
  let [lo, hi] = range(s, id);
  if (random() < 0.6) {
    const reach = 3 + below(random, 12);
    lo = Math.max(lo, from - reach);
    hi = Math.min(hi, from + reach);
  }
  if (hi <= lo) return -1;
  const to = lo + below(random, hi - lo + 1);
  if (to === from) return -1;
  leaveRing(s.d.ring, id);
  return shift(s.order, from, to);
};

/** Place, way and person of a job's blocks are chosen anew. */
function freeChoices(s: Search, job: number): void {
  for (const id of s.d.shop.jobs[job]!.blocks) {
    const { first, last } = s.d.shop.blocks[id]!;
    s.d.choice[id] = -1;
    leaveRing(s.d.ring, id);
    s.d.handOf.fill(-1, first, last + 1);
    s.d.spotOf.fill(-1, first, last + 1);
    s.d.wishOf.fill(0, first, last + 1);
  }
}

/** Takes the blocks of the marked jobs out of the order and puts them back, job by job, each at a position of its own. */
function reinsert(s: Search, random: Random, jobs: readonly number[], out: Uint8Array, spread: number): number {
  const { shop } = s.d;
  const { order } = s;
  let kept = 0;
  let first = order.length;
  for (let i = 0; i < order.length; i++) {
    if (out[shop.blocks[order[i]!]!.job]) first = Math.min(first, i);
    else order[kept++] = order[i]!;
  }
  for (const job of jobs) {
    const to = spread < 0 ? below(random, kept + 1) : Math.max(0, Math.min(kept, spread + below(random, 9) - 4));
    const { blocks } = shop.jobs[job]!;
    order.copyWithin(to + blocks.length, to, kept);
    blocks.forEach((id, k) => (order[to + k] = id));
    kept += blocks.length;
    first = Math.min(first, to);
  }
  return first;
}

/** One whole job to another position, its blocks together, everything about it chosen anew. */
export const moveJob: Move = (s, random) => takeJobs(s, random, 1);

/** Two to four jobs that stand near each other taken out and put back. */
export const moveJobs: Move = (s, random) => takeJobs(s, random, 2 + below(random, 3));

function takeJobs(s: Search, random: Random, count: number): number {
  const { shop } = s.d;
  if (shop.jobs.length < 2) return -1;
  const out = new Uint8Array(shop.jobs.length);
  const jobs: number[] = [];
  const around = below(random, s.order.length);
  const reach = Math.max(8, count * 6);
  for (let tries = 0; tries < count * 3 && jobs.length < count; tries++) {
    const i = tries === 0 ? around : around - reach + below(random, 2 * reach + 1);
    if (i < 0 || i >= s.order.length) continue;
    const { job } = shop.blocks[s.order[i]!]!;
    if (!out[job]) jobs.push(job);
    out[job] = 1;
    freeChoices(s, job);
  }
  return reinsert(s, random, jobs, out, count > 1 && random() < 0.5 ? around : -1);
}

/** Another way of doing a block, or whichever ends first. */
export const changeWay: Move = (s, random) => {
  const from = below(random, s.order.length);
  const id = s.order[from]!;
  const n = s.d.shop.blocks[id]!.variants.length;
  if (n < 2) return -1;
  const next = below(random, n);
  s.d.choice[id] = next === s.d.choice[id] ? -1 : next;
  for (let mate = s.d.ring[id]!; mate !== id; mate = s.d.ring[mate]!) s.d.choice[mate] = -1;
  return from;
};

/** Another person for a stage, or whoever is free first. */
export const changeHands: Move = (s, random) => {
  const { shop } = s.d;
  const stage = below(random, shop.stageCount);
  const block = shop.blockOf[stage]!;
  const way = s.heldPlacing.way[stage];
  if (block < 0 || !way || way.people.length < 2) return -1;
  s.d.handOf[stage] = random() < 0.4 ? -1 : way.people[below(random, way.people.length)]!;
  return s.at[block]!;
};

/** Another place for a stage, or whichever is free first. */
export const changePlace: Move = (s, random) => {
  const { shop } = s.d;
  const stage = below(random, shop.stageCount);
  const block = shop.blockOf[stage]!;
  const way = s.heldPlacing.way[stage];
  if (block < 0 || !way || way.stay || way.places.length < 2) return -1;
  s.d.spotOf[stage] = random() < 0.4 ? -1 : way.places[below(random, way.places.length)]!;
  return s.at[block]!;
};

const weighsMoves = (shop: Shop): boolean => shop.problem.objective.moves > 0 && shop.problem.baseline.length > 0;

function hasMoved(s: Search, id: number): boolean {
  const { first, last } = s.d.shop.blocks[id]!;
  for (let k = first; k <= last; k++) if (s.d.shop.basePlace[k]! >= 0 && moved(s.d.state, k)) return true;
  return false;
}

/** A job without room, and others that stand about when it was published or might begin. */
function aroundLeftOut(s: Search, random: Random, count: number): number[] {
  const { shop } = s.d;
  const out = shop.jobs.flatMap((_, j) => (s.heldOut[j] ? [j] : []));
  const job = out[below(random, out.length)]!;
  const { first, last } = shop.jobs[job]!;
  const stage = first + below(random, last - first + 1);
  const at = shop.basePlace[stage]! >= 0 ? shop.baseStart[stage]! : shop.jobs[job]!.release;
  let near = 0;
  while (near < s.order.length && s.d.state.at.start[shop.blocks[s.order[near]!]!.first]! < at) near++;
  return jobsAround(s, random, near, [job], count + 1);
}

/** Jobs that stand near each other in the order of starts: one at random, the others around it. */
function neighbours(s: Search, random: Random, count: number): number[] {
  const { shop } = s.d;
  let around = below(random, s.order.length);
  // Where moving costs, mostly begin at something that has moved.
  for (let tries = 0; tries < 8 && weighsMoves(shop) && !hasMoved(s, s.order[around]!); tries++)
    around = below(random, s.order.length);
  return jobsAround(s, random, around, [shop.blocks[s.order[around]!]!.job], count);
}

/** Adds jobs that stand near a position of the order, until there are so many. */
function jobsAround(s: Search, random: Random, around: number, jobs: number[], count: number): number[] {
  const { shop } = s.d;
  const reach = 6 * count;
  for (let tries = 0; tries < 4 * count && jobs.length < count; tries++) {
    const i = around - reach + below(random, 2 * reach + 1);
    if (i < 0 || i >= s.order.length) continue;
    const { job } = shop.blocks[s.order[i]!]!;
    if (!jobs.includes(job)) jobs.push(job);
  }
  return jobs;
}

/**
 * Blocks to take out and put back, in the order in which to put them back: one to four jobs that stand near each other,
 * whole or from some block on, one after the other or interleaved. What was chosen for them is chosen anew.
 */
export function ruin(s: Search, random: Random): number[] {
  const { shop } = s.d;
  const count = 1 + below(random, 4);
  const whole = random() < 0.7;
  const leftOut = s.heldOut.includes(1) && random() < 0.5;
  const jobs = leftOut ? aroundLeftOut(s, random, count) : neighbours(s, random, count);
  const cuts = jobs.map((job): Cut => {
    const { blocks } = shop.jobs[job]!;
    return { job, from: whole || s.heldOut[job] ? 0 : below(random, blocks.length) };
  });
  if (shop.shares) shareRuns(s, random, cuts);
  const queues = cuts.map(({ job, from }) => shop.jobs[job]!.blocks.slice(from));
  for (let i = queues.length - 1; i > 0; i--) {
    const k = below(random, i + 1);
    [queues[i], queues[k]] = [queues[k]!, queues[i]!];
  }
  const ids = random() < 0.5 ? queues.flat() : interleaved(queues, random);
  const published = weighsMoves(shop) && random() < HOME;
  for (const id of ids) choose(s, random, id, published);
  return ids;
}

/** The queues merged at random, each in its own order. */
function interleaved(queues: readonly number[][], random: Random): number[] {
  const ids: number[] = [];
  const left = queues.map((q) => q.length);
  for (let n = left.reduce((x, y) => x + y, 0); n > 0; n--) {
    let at = below(random, n);
    const q = left.findIndex((l) => (at -= l) < 0);
    ids.push(queues[q]![queues[q]!.length - left[q]!]!);
    left[q]!--;
  }
  return ids;
}

/** Share of ruins after which everything is asked to go back to where it was published, where moving costs. */
const HOME = 0.3;

/**
 * Shares of blocks put back in a way drawn by lot, and of stages with a person or a place drawn by lot; more in shops of
 * at most so many blocks, where the good plans lie far apart.
 */
const SMALL = 60;
const OTHER_WAY = { small: 0.15, large: 0.05 };
const OTHER_SPOT = { small: 0.06, large: 0.015 };

/** Mostly leaves place, way and person of a block to the decoder, now and then asks for something else. */
function choose(s: Search, random: Random, id: number, published: boolean): void {
  const { shop, choice, handOf, spotOf, wishOf } = s.d;
  const { first, last, variants } = shop.blocks[id]!;
  // The longest finish alone counts: then a job may as well start later than it could.
  const waiting = shop.problem.objective.flow + shop.problem.objective.tardiness > 0 ? 0.02 : 0.3;
  const size = shop.blocks.length > SMALL ? 'large' : 'small';
  choice[id] = random() < OTHER_WAY[size] ? below(random, variants.length) : -1;
  for (let k = first; k <= last; k++) {
    const way = s.heldPlacing.way[k];
    handOf[k] =
      way && way.people.length > 1 && random() < OTHER_SPOT[size] ? way.people[below(random, way.people.length)]! : -1;
    spotOf[k] =
      way && way.places.length > 1 && random() < OTHER_SPOT[size] ? way.places[below(random, way.places.length)]! : -1;
    wishOf[k] = k === first && random() < waiting ? below(random, s.ledger.last + 1) : 0;
  }
  if (published) wishPublished(s, id);
}
