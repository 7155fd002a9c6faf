import { breakRing, joinRings, leaveRing, type Ring } from '../engine/ring.ts';
import { below, type Random } from '../random.ts';
import type { Search } from './candidate.ts';

/** A job that is taken out and put back, from its `from`th block on. */
export type Cut = { job: number; from: number };

/** Shares of ruins that bring two blocks together in a load, and of loads met that are broken. */
const JOIN = 0.25;
const BREAK = 0.3;
/** Candidates for one place in a load, of which the one that runs nearest is asked. */
const ASKED = 3;
/** Jobs that one ruin may take out in all. */
const MOST = 12;

/** Lets some of the jobs taken out share a run, or no longer. Whoever runs with them is taken out too. */
export function shareRuns(s: Search, random: Random, cuts: Cut[]): void {
  withMates(s, cuts, () => random() < BREAK, random);
  if (!s.forms || random() >= JOIN || cuts.length >= MOST) return;
  const able = cuts.flatMap(({ job, from }) =>
    s.d.shop.jobs[job]!.blocks.slice(from).filter((id) => s.d.shop.mates[id]!.length > 0),
  );
  if (able.length === 0) return;
  const id = able[below(random, able.length)]!;
  const mate = nearMate(s, random, id);
  if (jobsMeet(s, id, mate)) return;
  addCut(s, cuts, mate);
  withMates(s, cuts, () => false, random);
  joinRings(s.d.ring, id, mate);
}

/** Adds the jobs that share a load with those taken out, as they run and as they are to run. */
function withMates(s: Search, cuts: Cut[], breaks: () => boolean, random: Random): void {
  const { shop, ring } = s.d;
  for (let i = 0; i < cuts.length; i++) {
    // Those added are looked at in their turn; one of them may reach back further than before.
    for (let k = cuts[i]!.from; k < shop.jobs[cuts[i]!.job]!.blocks.length; k++) {
      const id = shop.jobs[cuts[i]!.job]!.blocks[k]!;
      let wider = addMates(s, cuts, s.held.ring, id);
      if (addMates(s, cuts, ring, id)) wider = true;
      if (ring[id] !== id && breaks()) {
        if (random() < 0.5) leaveRing(ring, id);
        else breakRing(ring, id);
      }
      if (wider) i = -1; // from the beginning: at most as often as there are blocks
      if (wider) break;
    }
  }
}

/** Whether a job that was looked at already is cut further back than before. */
function addMates(s: Search, cuts: Cut[], ring: Ring, id: number): boolean {
  let wider = false;
  for (let mate = ring[id]!; mate !== id; mate = ring[mate]!) if (addCut(s, cuts, mate)) wider = true;
  return wider;
}

function addCut(s: Search, cuts: Cut[], id: number): boolean {
  const { shop } = s.d;
  const { job } = shop.blocks[id]!;
  const from = s.heldOut[job] ? 0 : id - shop.jobs[job]!.blocks[0]!;
  const known = cuts.find((cut) => cut.job === job);
  if (!known) cuts.push({ job, from });
  else if (known.from > from) known.from = from;
  else return false;
  return known !== undefined;
}

/** One of those that could run with it, most likely one that runs about then. */
function nearMate(s: Search, random: Random, id: number): number {
  const { shop } = s.d;
  const mates = shop.mates[id]!;
  const { start } = s.heldPlacing;
  const at = start[shop.blocks[id]!.first]!;
  let best = -1;
  for (let n = 0; n < ASKED; n++) {
    const mate = mates[below(random, mates.length)]!;
    const away = (other: number): number => Math.abs(start[shop.blocks[other]!.first]! - at);
    if (best < 0 || away(mate) < away(best)) best = mate;
  }
  return best;
}

/** Whether one job would be twice in the load. */
function jobsMeet({ d }: Search, a: number, b: number): boolean {
  const { blocks } = d.shop;
  const jobs = new Set<number>();
  let id = a;
  do {
    jobs.add(blocks[id]!.job);
    id = d.ring[id]!;
  } while (id !== a);
  id = b;
  do {
    if (jobs.has(blocks[id]!.job)) return true;
    id = d.ring[id]!;
  } while (id !== b);
  return false;
}
