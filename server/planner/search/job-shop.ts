import { NEVER } from '../engine/calendar.ts';
import { HANDS, ONSITE, PAUSED, RACK, type Shop, type Way } from '../engine/shop.ts';

/**
 * A problem that is a (flexible) job shop and nothing else: one machine at a time, no gaps, no people, the makespan to be
 * short. Operations are stages; each has one or more machines with its minutes there.
 */
export type JobShop = {
  operations: number;
  machines: number;
  /** Operation before and after in the job, -1 where there is none. */
  before: Int32Array;
  after: Int32Array;
  /** Earliest start. */
  release: Int32Array;
  /** Per operation its machines, the minutes there, and the way that it is. */
  places: Int32Array[];
  minutes: Int32Array[];
  ways: Way[][];
};

const plainWay = (shop: Shop, way: Way): boolean => plainWork(shop, way) && way.gapMin === 0 && way.gapMax >= NEVER;

const plainWork = (shop: Shop, way: Way): boolean =>
  !way.stay &&
  !way.hands &&
  way.lampCount === 0 &&
  way.settle === 0 &&
  way.segments === 1 &&
  way.segNeed[0] !== HANDS &&
  way.segNeed[0] !== PAUSED &&
  (way.segNeed[0] !== ONSITE || alwaysOpen(shop)) &&
  way.minutes > 0 &&
  (way.family < 0 || shop.longestCleanup === 0) &&
  way.places.length > 0;

const alwaysOpen = ({ open, horizon }: Shop): boolean => open.n === 1 && open.from[0] === 0 && open.to[0]! >= horizon;

const airMatters = (shop: Shop): boolean => shop.lampCount > 0;

/** Only the makespan counts, nothing is fixed, and the places are machines and no more. */
function onlyMachines(shop: Shop): boolean {
  const w = shop.problem.objective;
  if (w.makespan <= 0 || w.tardiness > 0 || w.flow > 0 || w.booth > 0 || w.moves > 0) return false;
  if (shop.problem.fixed.length > 0 || airMatters(shop) || shop.stageCount === 0) return false;
  return !shop.placeKind.some((k) => k === RACK) && !shop.placeClosed.some((c) => c.n > 0);
}

/** Whether the problem is a no-wait job shop without choice: each operation begins when the one before it ends. */
export const isNoWait = (shop: Shop): boolean =>
  onlyMachines(shop) &&
  shop.ways.every((ways, s) => {
    const way = ways[0]!;
    const tight = s === shop.jobs[shop.stageJob[s]!]!.first || (way.gapMin === 0 && way.gapMax === 0);
    return ways.length === 1 && way.places.length === 1 && plainWork(shop, way) && tight;
  });

/** The problem as a job shop, or null where it is more than that. */
export function asJobShop(shop: Shop): JobShop | null {
  if (!onlyMachines(shop)) return null;
  if (!shop.ways.every((ways) => ways.every((way) => plainWay(shop, way)))) return null;
  const options = shop.ways.map((ways) => ways.flatMap((way) => [...way.places].map((place) => ({ way, place }))));
  return {
    operations: shop.stageCount,
    machines: shop.placeCount,
    before: Int32Array.from(shop.stageJob, (j, s) => (s > shop.jobs[j]!.first ? s - 1 : -1)),
    after: Int32Array.from(shop.stageJob, (j, s) => (s < shop.jobs[j]!.last ? s + 1 : -1)),
    release: Int32Array.from(shop.stageJob, (j, s) =>
      s > shop.jobs[j]!.first ? 0 : Math.max(shop.now, shop.jobs[j]!.release),
    ),
    places: options.map((o) => Int32Array.from(o, (x) => x.place)),
    minutes: options.map((o) => Int32Array.from(o, (x) => x.way.minutes)),
    ways: options.map((o) => o.map((x) => x.way)),
  };
}

/** Sequences on the machines as linked lists, with the longest paths through them. */
export type Graph = {
  /** Which of its options each operation takes. */
  option: Int32Array;
  place: Int32Array;
  minutes: Int32Array;
  /** Neighbours on the machine, -1 at the ends. */
  prev: Int32Array;
  next: Int32Array;
  /** First operation of each machine, -1 where there is none. */
  first: Int32Array;
  /** Longest path up to the start, and from the end on. */
  head: Int32Array;
  tail: Int32Array;
  topo: Int32Array;
  waiting: Int8Array;
  length: number;
};

export function makeGraph(js: JobShop): Graph {
  const n = js.operations;
  const ints = (size: number): Int32Array => new Int32Array(size).fill(-1);
  return {
    option: new Int32Array(n),
    place: new Int32Array(n),
    minutes: new Int32Array(n),
    prev: ints(n),
    next: ints(n),
    first: ints(js.machines),
    head: new Int32Array(n),
    tail: new Int32Array(n),
    topo: new Int32Array(n),
    waiting: new Int8Array(n),
    length: 0,
  };
}

export function copyGraph(from: Graph, to: Graph): void {
  for (const key of ['option', 'place', 'minutes', 'prev', 'next', 'first', 'head', 'tail', 'topo'] as const)
    to[key].set(from[key]);
  to.length = from.length;
}

/** Heads, tails and the longest path; false where the sequences contain a cycle. */
export function measure(js: JobShop, g: Graph): boolean {
  const { before, after, release } = js;
  const { prev, next, minutes, head, tail, topo, waiting } = g;
  const n = js.operations;
  let filled = 0;
  for (let v = 0; v < n; v++) {
    waiting[v] = (before[v]! >= 0 ? 1 : 0) + (prev[v]! >= 0 ? 1 : 0);
    if (waiting[v] === 0) topo[filled++] = v;
  }
  let length = 0;
  for (let i = 0; i < filled; i++) {
    const v = topo[i]!;
    const b = before[v]!;
    const p = prev[v]!;
    let at = release[v]!;
    if (b >= 0 && head[b]! + minutes[b]! > at) at = head[b]! + minutes[b]!;
    if (p >= 0 && head[p]! + minutes[p]! > at) at = head[p]! + minutes[p]!;
    head[v] = at;
    if (at + minutes[v]! > length) length = at + minutes[v]!;
    const a = after[v]!;
    const x = next[v]!;
    if (a >= 0 && --waiting[a]! === 0) topo[filled++] = a;
    if (x >= 0 && --waiting[x]! === 0) topo[filled++] = x;
  }
  if (filled < n) return false;
  for (let i = n - 1; i >= 0; i--) {
    const v = topo[i]!;
    const a = after[v]!;
    const x = next[v]!;
    let to = 0;
    if (a >= 0) to = tail[a]! + minutes[a]!;
    if (x >= 0 && tail[x]! + minutes[x]! > to) to = tail[x]! + minutes[x]!;
    tail[v] = to;
  }
  g.length = length;
  return true;
}

export function unlink(g: Graph, v: number): void {
  const p = g.prev[v]!;
  const x = g.next[v]!;
  if (p >= 0) g.next[p] = x;
  else g.first[g.place[v]!] = x;
  if (x >= 0) g.prev[x] = p;
}

/** Puts `v` on its machine after `p`, or first where `p` is -1. */
export function linkAfter(g: Graph, v: number, p: number): void {
  const x = p >= 0 ? g.next[p]! : g.first[g.place[v]!]!;
  g.prev[v] = p;
  g.next[v] = x;
  if (p >= 0) g.next[p] = v;
  else g.first[g.place[v]!] = v;
  if (x >= 0) g.prev[x] = v;
}
