import { NEVER } from './calendar.ts';
import { type Decoder, IS_OUT, STANDS, TOO_LATE } from './decode.ts';
import { keepThis, lowest, takeKept } from './keep.ts';
import { joins, runLength, standAlike } from './load-mates.ts';
import { MOST_MEMBERS, type Party, placeParty, putPartyBack } from './party.ts';
import type { Block, Variant, Way } from './shop.ts';

/** The members of a block's load, by number. False: more than a load may have. */
export function gather(d: Decoder, id: number): boolean {
  const { party, ring, shop } = d;
  party.count = 0;
  let next = id;
  do {
    if (party.count === MOST_MEMBERS) return false;
    let i = party.count++;
    for (; i > 0 && party.blocks[i - 1]!.id > next; i--) party.blocks[i] = party.blocks[i - 1]!;
    party.blocks[i] = shop.blocks[next]!;
    next = ring[next]!;
  } while (next !== id);
  return true;
}

/**
 * Places the load whose members are gathered, each block so that it ends before its limit. As chosen, or in whichever way
 * the members end first. IS_OUT: no room; then nothing has changed, and nobody is left out.
 */
export function decodeLoad(d: Decoder, limited: boolean): number {
  const { party } = d;
  for (let i = 0; i < party.count; i++) party.floors[i] = lowest(d, party.blocks[i]!);
  const lead = party.blocks[0]!;
  const chosen = d.choice[lead.id]!;
  if (chosen >= 0) {
    if (agree(d, lead.variants[chosen]!, true) && placeParty(d, party)) return chose(d, party);
    if (limited) return TOO_LATE;
  }
  return placeBest(d) ? STANDS : limited ? TOO_LATE : IS_OUT;
}

/** Notes what the members took. */
function chose(d: Decoder, party: Party): number {
  for (let i = 0; i < party.count; i++) {
    const block = party.blocks[i]!;
    d.choice[block.id] = block.variants.indexOf(party.taken[i]!);
  }
  return STANDS;
}

/** Tries each way of the leader; the least sum of weighted ends wins, of equals the one that takes less booth. */
function placeBest(d: Decoder): boolean {
  const { party, state } = d;
  const booth = state.boothMinutes;
  let best = Infinity;
  let bestBooth = 0;
  for (const variant of party.blocks[0]!.variants) {
    if (!agree(d, variant, false) || !placeParty(d, party)) continue;
    const sum = weighedEnds(d);
    const minutes = state.boothMinutes - booth;
    if (sum < best || (sum === best && minutes < bestBooth)) {
      best = sum;
      bestBooth = minutes;
      chose(d, party);
      for (let i = 0; i < party.count; i++) keepThis(d, party.blocks[i]!, party.floors[i]!);
    }
    putPartyBack(d, party);
  }
  if (best === Infinity) return false;
  for (let i = 0; i < party.count; i++) {
    const block = party.blocks[i]!;
    takeKept(d, block, party.floors[i]!, block.variants[d.choice[block.id]!]!);
  }
  return true;
}

function weighedEnds({ party, shop, state }: Decoder): number {
  let sum = 0;
  for (let i = 0; i < party.count; i++) {
    const { job, last } = party.blocks[i]!;
    sum += (shop.jobs[job]!.weight + 0.01) * state.at.end[last]!;
  }
  return sum;
}

/**
 * Finds where the leader's variant can share its stages with all members, and what each of them may take then. `strict`:
 * only what has been chosen for it.
 */
function agree(d: Decoder, variant: Variant, strict: boolean): boolean {
  const { party } = d;
  for (let k = 0; k < variant.ways.length; k++) {
    const n = variant.ways[k]!.load < 0 || (k > 0 && variant.ways[k]!.stay) ? 0 : runLength(variant.ways, k);
    if (n === 0) continue;
    party.ways.length = n;
    for (let i = 0; i < n; i++) party.ways[i] = variant.ways[k + i]!;
    party.heads[0] = k;
    setOnly(party.options[0]!, variant);
    let i = 1;
    while (i < party.count && agreeWith(d, variant, i, strict)) i++;
    if (i === party.count) return true;
  }
  return false;
}

function setOnly(list: Variant[], variant: Variant): void {
  list.length = 1;
  list[0] = variant;
}

/** Working memory of one call, so that a refusal in the middle leaves the load's ways alone. */
const tried: Way[] = [];

function agreeWith(d: Decoder, lead: Variant, i: number, strict: boolean): boolean {
  const { party, shop, choice } = d;
  const { variants, id, first } = party.blocks[i]!;
  const place = lead.pins[party.heads[0]!]!;
  const at = party.blocks[0]!.first + party.heads[0]!;
  for (let v = 0; v < variants.length; v++) {
    if (strict && choice[id]! >= 0 && v !== choice[id]) continue;
    const variant = variants[v]!;
    for (let m = 0; m < variant.ways.length; m++) {
      if (!standAlike(shop, at, lead.ways[party.heads[0]!]!, first + m, variant.ways[m]!)) continue;
      if (!joins(shop, party.ways, place, variant, m, tried)) continue;
      for (let k = 0; k < tried.length; k++) party.ways[k] = tried[k]!;
      party.heads[i] = m;
      if (strict && choice[id]! >= 0) setOnly(party.options[i]!, variant);
      else alikeUntil(party.blocks[i]!, variant, m + tried.length, party.options[i]!);
      return true;
    }
  }
  return false;
}

/** The block's variants that are the same up to stage `n`. */
function alikeUntil({ variants }: Block, one: Variant, n: number, into: Variant[]): void {
  into.length = 0;
  for (const variant of variants) {
    let k = 0;
    while (k < n && variant.ways[k] === one.ways[k] && variant.pins[k] === one.pins[k]) k++;
    if (k === n && !variant.ways[n]?.stay) into.push(variant);
  }
}

/** No limit for any member. */
export const unlimited = (party: Party): void => void party.limits.fill(NEVER);
