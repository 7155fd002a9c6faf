import { NEVER } from './engine/calendar.ts';
import { fitFrom, laySegments } from './engine/fit.ts';
import { makePlacer, type Placer } from './engine/placer.ts';
import { BOOTH, type Shop, type Way } from './engine/shop.ts';
import { jacksonBound } from './one-machine.ts';

/** Sound lower bounds: the earliest end of each job beside nothing but what is fixed, and of the whole cost. */
export type Bounds = { alone: Int32Array; cost: number };

export function lowerBounds(shop: Shop): Bounds {
  const p = makePlacer(shop);
  const heads = new Int32Array(shop.stageCount);
  const alone = Int32Array.from(shop.jobs, (_, j) => aloneEnd(p, j, heads));
  return { alone: alone.map((end) => Math.min(end, shop.horizon)), cost: costBound(shop, alone, heads) };
}

/** The cheaper of two kinds of plan: all jobs placed, or some left out, each for its price. */
function costBound(shop: Shop, alone: Int32Array, heads: Int32Array): number {
  const w = shop.problem.objective;
  let placed = 0;
  let either = 0;
  let last = 0;
  let cheapest = Infinity;
  shop.jobs.forEach((job, j) => {
    const out = w.unplaced * job.weight;
    const end = alone[j]!;
    const late = job.due >= 0 ? w.tardiness * Math.max(0, end - job.due) : 0;
    const part =
      end >= NEVER ? out : job.weight * (late + w.flow * (end - job.release)) + w.booth * leastBooth(shop, j);
    placed += part;
    either += Math.min(part, out);
    if (end < NEVER) {
      last = Math.max(last, end);
      cheapest = Math.min(cheapest, out);
    }
  });
  if (w.makespan > 0) placed += w.makespan * Math.max(last, jacksonBound(shop, heads));
  return Math.min(placed, Math.max(either, cheapest));
}

/** The earliest end of a job, stage by stage, without its maximum gaps; NEVER if it has no room at all. */
function aloneEnd(p: Placer, j: number, heads: Int32Array): number {
  const { shop } = p;
  const job = shop.jobs[j]!;
  let end = -1;
  for (let s = job.first; s <= job.last; s++) {
    const fixed = p.state.at.way[s];
    if (fixed) {
      heads[s] = p.state.at.start[s]!;
      end = p.state.at.end[s]!;
      continue;
    }
    let best = NEVER;
    let head = NEVER;
    for (const way of shop.ways[s]!) {
      const from = Math.max(shop.now, s === job.first ? job.release : end + way.gapMin);
      const to = earliestEnd(p, s, way, from);
      if (to < best) best = to;
      if (to < NEVER && from < head) head = from;
    }
    if (best >= NEVER) return NEVER;
    heads[s] = head;
    end = best;
  }
  return end;
}

/** The earliest end of one way from `from` on; never later than it can be. */
function earliestEnd(p: Placer, s: number, way: Way, from: number): number {
  if (way.lamps.length < way.lampCount || (way.hands && way.people.length === 0)) return NEVER;
  if (!way.rigid && way.segments > 1) return from + way.minutes; // its fit may pass over minutes: too weak to swear by
  Object.assign(p.ask, { stage: s, way, units: way.units, stayFrom: -1, settle: 0, holdUntil: 0, goesOn: true });
  let best = NEVER;
  const people = way.hands ? [...way.people] : [-1];
  for (const person of people) {
    p.ask.person = person;
    if (way.stay) {
      if (laySegments(p.state, way, person, from, p.fit) < NEVER) best = Math.min(best, p.fit.end);
      continue;
    }
    for (const place of way.places) {
      p.ask.place = place;
      if (fitFrom(p.state, p.ask, from, best, p.fit)) best = Math.min(best, p.fit.end);
      if (best === from + way.minutes) return best;
    }
  }
  return best;
}

/** Booth minutes that a job takes whatever is chosen for it. */
function leastBooth(shop: Shop, j: number): number {
  const job = shop.jobs[j]!;
  let sum = 0;
  let inBooth = false;
  for (let s = job.first; s <= job.last; s++) {
    if (shop.fixedAt[s]! >= 0) {
      inBooth = false;
      continue;
    }
    const ways = shop.ways[s]!;
    const sure = (w: Way): boolean =>
      w.load < 0 && (w.stay ? inBooth : w.places.every((q) => shop.placeKind[q] === BOOTH));
    if (inBooth)
      sum += Math.min(...ways.map((w) => (w.stay ? w.gapMin + w.minutes : w.settle + (sure(w) ? w.minutes : 0))));
    else sum += Math.min(...ways.map((w) => (sure(w) ? w.minutes : 0)));
    inBooth = ways.every(sure);
  }
  return sum;
}
