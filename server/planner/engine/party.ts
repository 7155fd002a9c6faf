import { prepareChain, runChain } from './chain.ts';
import { riderWay } from './joint-ways.ts';
import { keepBefore, putBack } from './keep.ts';
import { type Placer, takeOut } from './placer.ts';
import type { Block, Shop, Variant, Way } from './shop.ts';
import { enter } from './state.ts';

/** Most blocks in one load. */
export const MOST_MEMBERS = 8;

/** Blocks that are to run as one load, the one that leads it first; made once and filled again and again. */
export type Party = {
  count: number;
  blocks: Block[];
  /** The stage of its block with which each member's share begins, counted from the block's first. */
  heads: Int32Array;
  /** Ways of the stages shared, all members' as one. */
  ways: Way[];
  /** What each member may take; all of one member share the same ways. The leader has one. */
  options: Variant[][];
  /** What each member took. */
  taken: Variant[];
  /** Minute before which each member's block has to end. */
  limits: Int32Array;
  /** First stage of each member's job that may move later. */
  floors: Int32Array;
  /** Least start and end of each shared stage, as members ask for them. */
  starts: Int32Array;
  ends: Int32Array;
};

export function makeParty(shop: Shop): Party {
  const longest = shop.blocks.reduce((most, b) => Math.max(most, b.last - b.first + 1), 1);
  return {
    count: 0,
    blocks: [],
    heads: new Int32Array(MOST_MEMBERS),
    ways: [],
    options: Array.from({ length: MOST_MEMBERS }, () => []),
    taken: [],
    limits: new Int32Array(MOST_MEMBERS),
    floors: new Int32Array(MOST_MEMBERS),
    starts: new Int32Array(longest),
    ends: new Int32Array(longest),
  };
}

/** Times the leader may be asked to come later before the load counts as not fitting. */
const MOST_TRIES = 12;

/**
 * Places a load: the leader's block with the minutes of all, then the others beside it, each with what comes before and
 * after the shared stages on its own. Who cannot be there yet has the leader come later. False: no room, and all is as before.
 */
export function placeParty(p: Placer, party: Party): boolean {
  party.starts.fill(0);
  party.ends.fill(0);
  for (let i = 1; i < party.count; i++) waitFor(p, party, i);
  for (let i = 0; i < party.count; i++) keepBefore(p, party.blocks[i]!, party.floors[i]!);
  for (let tries = 0; tries < MOST_TRIES; tries++) {
    p.wants.lead = -1;
    if (placeLead(p, party) && placeRiders(p, party)) {
      trimSettling(p, party);
      return true;
    }
    putPartyBack(p, party);
    if (p.wants.lead < 0) return false;
    const k = p.wants.lead - party.blocks[0]!.first - party.heads[0]!;
    party.starts[k] = Math.max(party.starts[k]!, p.wants.start);
    party.ends[k] = Math.max(party.ends[k]!, p.wants.end);
  }
  return false;
}

/** Takes all members out and puts what stands before them back. */
export function putPartyBack(p: Placer, party: Party): void {
  for (let i = 0; i < party.count; i++) putBack(p, party.blocks[i]!, party.floors[i]!);
}

/** The load cannot begin before a member's job is there; what the member does on its own before is found out later. */
function waitFor(p: Placer, party: Party, i: number): void {
  const { shop, state } = p;
  const { first, job } = party.blocks[i]!;
  const way = party.options[i]![0]!.ways[0]!;
  const there = first > shop.jobs[job]!.first ? state.at.end[first - 1]! + way.gapMin : shop.jobs[job]!.release;
  if (there > party.starts[0]!) party.starts[0] = there;
}

function placeLead(p: Placer, party: Party): boolean {
  const block = party.blocks[0]!;
  const variant = (party.taken[0] = party.options[0]![0]!);
  const floor = prepareChain(p, block, variant);
  const head = block.first + party.heads[0]!;
  const { length } = party.ways;
  for (let k = 0; k < length; k++) {
    p.wayOf[head + k] = party.ways[k]!;
    p.notBefore[head + k] = party.starts[k]!;
    p.endAtLeast[head + k] = party.ends[k]!;
  }
  p.letSettle[head + length - 1] = longestSettling(party);
  const stuck = runChain(p, block, variant, party.limits[0]!, floor);
  p.letSettle[head + length - 1] = 0;
  return stuck < 0;
}

const settleAfter = (party: Party, i: number, variant: Variant): number =>
  variant.ways[party.heads[i]! + party.ways.length]?.settle ?? 0;

/** As long as any member's next stage may ask for. */
function longestSettling(party: Party): number {
  let most = 0;
  for (let i = 0; i < party.count; i++)
    for (const variant of party.options[i]!) most = Math.max(most, settleAfter(party, i, variant));
  return most;
}

/** Now that every member's next stage is known, the place is held no longer than they ask. */
function trimSettling(p: Placer, party: Party): void {
  const { state } = p;
  const s = party.blocks[0]!.first + party.heads[0]! + party.ways.length - 1;
  let most = 0;
  for (let i = 0; i < party.count; i++) most = Math.max(most, settleAfter(party, i, party.taken[i]!));
  if (state.at.holdTo[s] === state.at.end[s]! + most) return;
  const way = state.at.way[s]!;
  takeOut(p, s);
  state.at.holdTo[s] = state.at.end[s]! + most;
  enter(state, s, way);
}

function placeRiders(p: Placer, party: Party): boolean {
  for (let i = 1; i < party.count; i++) if (!placeRider(p, party, i)) return false;
  return true;
}

/** Puts one member beside the leader, by the option with which its block ends first. */
function placeRider(p: Placer, party: Party, i: number): boolean {
  const block = party.blocks[i]!;
  const options = party.options[i]!;
  let end = party.limits[i]!;
  let best: Variant | null = null;
  for (const variant of options) {
    const stuck = runRider(p, party, i, variant, end);
    if (stuck < 0) {
      best = variant;
      end = p.state.at.end[block.last]!;
      if (options.length === 1) break;
    }
    putBack(p, block, party.floors[i]!);
  }
  if (!best) return false;
  party.taken[i] = best;
  return options.length === 1 || runRider(p, party, i, best, end + 1) < 0;
}

function runRider(p: Placer, party: Party, i: number, variant: Variant, limit: number): number {
  const block = party.blocks[i]!;
  const floor = prepareChain(p, block, variant);
  const head = party.heads[i]!;
  const lead = party.blocks[0]!.first + party.heads[0]!;
  party.ways.forEach((way, k) => {
    p.wayOf[block.first + head + k] = riderWay(p.shop, way, variant.ways[head + k]!);
    p.leadOf[block.first + head + k] = lead + k;
  });
  return runChain(p, block, variant, limit, floor);
}
