import { NEVER } from './calendar.ts';
import type { Decoder } from './decode.ts';
import type { Shop } from './shop.ts';

/** Weight of a job without room, on top of the problem's own: a plan that leaves nothing out always comes first. */
export const OUT = 1e9;

/**
 * The running cost of a schedule, complete or not: each job counts from the earliest end that is still possible for it,
 * so that a schedule is given up as soon as it cannot become good enough.
 */
export type Ledger = {
  /** Earliest possible end of each job, as placed so far. */
  est: Int32Array;
  /** Cost of each job at that end. */
  part: Float64Array;
  /** Sum of the parts. */
  sum: number;
  /** Latest of the ends. */
  last: number;
  /** Earliest end of each job in an empty shop. */
  alone: Int32Array;
};

export function makeLedger(shop: Shop, alone: Int32Array): Ledger {
  const n = shop.jobs.length;
  return { est: new Int32Array(n).fill(-1), part: new Float64Array(n), sum: 0, last: 0, alone };
}

/** Notes a job's earliest possible end. */
export function setEnd(l: Ledger, shop: Shop, j: number, end: number): void {
  if (l.est[j] === end) return;
  const job = shop.jobs[j]!;
  const w = shop.problem.objective;
  let part = w.flow * job.weight * (end - job.release);
  if (job.due >= 0 && end > job.due) part += w.tardiness * job.weight * (end - job.due);
  setPart(l, j, end, part);
  if (end > l.last) l.last = end;
}

/** Notes that a job has found no room. */
export const setOut = (l: Ledger, shop: Shop, j: number): void =>
  setPart(l, j, -2, OUT + shop.problem.objective.unplaced * shop.jobs[j]!.weight);

function setPart(l: Ledger, j: number, est: number, part: number): void {
  l.sum += part - l.part[j]!;
  l.part[j] = part;
  l.est[j] = est;
}

/** Sums and maxima from scratch: decrements leave rounding and a stale maximum behind. */
export function settleLedger(l: Ledger): void {
  l.sum = 0;
  l.last = 0;
  for (let j = 0; j < l.est.length; j++) {
    l.sum += l.part[j]!;
    if (l.est[j]! > l.last) l.last = l.est[j]!;
  }
}

/** The cost as far as it is known; the whole cost once every block is placed. */
export function costOf(d: Decoder, l: Ledger): number {
  const w = d.shop.problem.objective;
  return l.sum + w.makespan * l.last + w.booth * d.state.boothMinutes + w.moves * d.state.moves;
}

/** Minute before which job `j` has to end so that the whole cost, as far as it is known, stays within `limit`. */
export function latestEnd(d: Decoder, l: Ledger, j: number, limit: number): number {
  if (limit === Infinity) return NEVER;
  const { shop } = d;
  const job = shop.jobs[j]!;
  const w = shop.problem.objective;
  const budget = limit - costOf(d, l) + l.part[j]!;
  const flow = w.flow * job.weight;
  const late = job.due >= 0 ? w.tardiness * job.weight : 0;
  let end = Infinity;
  if (flow > 0) end = job.release + budget / flow;
  if (late > 0 && end > job.due)
    end = Math.max(job.due, (budget + flow * job.release + late * job.due) / (flow + late));
  if (w.makespan > 0) end = Math.min(end, l.last + (limit - costOf(d, l)) / w.makespan);
  return end >= NEVER - 1 ? NEVER - 1 : Math.max(0, Math.floor(end + 1e-6) + 1);
}
