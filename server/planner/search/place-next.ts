import { NEVER } from '../engine/calendar.ts';
import { decodeBlock, IS_OUT, STANDS, TOO_LATE } from '../engine/decode.ts';
import { decodeLoad, gather } from '../engine/decode-load.ts';
import { breakRing, leaveRing } from '../engine/ring.ts';
import { costOf, latestEnd, OUT, setEnd, setOut } from '../engine/run-cost.ts';
import type { Search } from './candidate.ts';

/** Places one block, with its load where it has one; false where the cost passes `limit` by it. */
export function placeNext(s: Search, id: number, limit: number): boolean {
  const { d, ledger } = s;
  const { shop } = d;
  const { job, first } = shop.blocks[id]!;
  if (d.out[job] || d.state.at.way[first]) return true; // out, or here already with a load
  if (d.ring[id] !== id) return placeTogether(s, id, limit);
  const outcome = decodeBlock(d, id, latest(s, id, limit));
  if (outcome === TOO_LATE) return false;
  if (outcome === IS_OUT) {
    if (runsWithOthers(s, job)) return false; // its load would hang in the air
    setOut(ledger, shop, job);
  } else noteEnd(s, id);
  return costOf(d, ledger) <= limit;
}

/** Minute before which the block has to end. While a job is out, any end is better than none. */
function latest(s: Search, id: number, limit: number): number {
  const { shop } = s.d;
  const { job, last } = shop.blocks[id]!;
  return limit >= OUT ? NEVER : latestEnd(s.d, s.ledger, job, limit) - shop.tail[last]!;
}

function noteEnd({ d, ledger }: Search, id: number): void {
  const { shop, state } = d;
  const { job, last } = shop.blocks[id]!;
  const at = state.at.end[last]! + shop.tail[last]!;
  if (last === shop.jobs[job]!.last || at > ledger.est[job]!) setEnd(ledger, shop, job, at);
}

const runsWithOthers = ({ d }: Search, job: number): boolean => d.shop.jobs[job]!.blocks.some((b) => d.ring[b] !== b);

/** Places a whole load, what its members do before it first. Where it has no room at all, each of them goes alone. */
function placeTogether(s: Search, id: number, limit: number): boolean {
  const { d } = s;
  const { ring, party } = d;
  if (s.awaited[id]) return false; // two loads, each waiting for the other
  if (!bringUp(s, id, limit)) return false;
  leaveThoseOut(s, id);
  if (ring[id] === id) return placeNext(s, id, limit);
  const known = gather(d, id);
  for (let i = 0; i < party.count; i++) party.limits[i] = latest(s, party.blocks[i]!.id, limit);
  const outcome = known ? decodeLoad(d, limit < OUT) : limit < OUT ? TOO_LATE : IS_OUT;
  if (outcome === TOO_LATE) return false;
  if (outcome === STANDS) {
    for (let i = 0; i < party.count; i++) noteEnd(s, party.blocks[i]!.id);
    return costOf(d, s.ledger) <= limit;
  }
  return placeApart(s, id, limit);
}

/** Earlier blocks of all members' jobs. */
function bringUp(s: Search, id: number, limit: number): boolean {
  const { ring } = s.d;
  let fine = true;
  let member = id;
  do {
    s.awaited[member] = 1;
    member = ring[member]!;
  } while (member !== id);
  do {
    fine &&= placeBefore(s, member, limit);
    member = ring[member]!;
  } while (member !== id);
  do {
    s.awaited[member] = 0;
    member = ring[member]!;
  } while (member !== id);
  return fine;
}

function placeBefore(s: Search, id: number, limit: number): boolean {
  const { shop } = s.d;
  for (let b = shop.jobs[shop.blocks[id]!.job]!.blocks[0]!; b < id; b++) if (!placeNext(s, b, limit)) return false;
  return true;
}

/** Nobody waits for a job that has found no room. */
function leaveThoseOut({ d }: Search, id: number): void {
  const { ring, shop, out } = d;
  for (let member = ring[id]!; member !== id;) {
    const next = ring[member]!;
    if (out[shop.blocks[member]!.job]) leaveRing(ring, member);
    member = next;
  }
  if (out[shop.blocks[id]!.job]) leaveRing(ring, id);
}

function placeApart(s: Search, id: number, limit: number): boolean {
  const { ring } = s.d;
  const members = [id];
  for (let member = ring[id]!; member !== id; member = ring[member]!) members.push(member);
  breakRing(ring, id);
  return members.every((member) => placeNext(s, member, limit));
}

/** The first position from which a change at `from` is felt: loads that reach across it are placed anew as a whole. */
export function reachBack(s: Search, from: number): number {
  let first = from;
  for (let i = s.order.length - 1; i >= first; i--) {
    const id = s.held.order[i]!;
    for (let m = s.held.ring[id]!; m !== id; m = s.held.ring[m]!) first = Math.min(first, s.at[m]!);
    for (let m = s.d.ring[id]!; m !== id; m = s.d.ring[m]!) first = Math.min(first, s.at[m]!);
  }
  return first;
}
