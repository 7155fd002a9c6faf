import type { Random } from '../random.ts';
import { type Graph, type JobShop, linkAfter, unlink } from './job-shop.ts';

/** A move: operation `v` after `at` on machine option `option` (`at` -1: first there). `estimate`: longest path through it. */
export type Best = { v: number; at: number; option: number; estimate: number; ties: number };

/** Until which iteration an order of two operations, or an operation on a machine, may not come back. */
export type Tabu = { pair: Int32Array; machine: Int32Array; n: number };

export const makeTabu = (js: JobShop): Tabu => ({
  pair: new Int32Array(js.operations * js.operations),
  machine: new Int32Array(js.operations * js.machines),
  n: js.operations,
});

export type Hunt = {
  js: JobShop;
  g: Graph;
  tabu: Tabu;
  now: number;
  aspire: number;
  random: Random;
  best: Best;
  any: Best;
  blind: boolean;
};

/** Remembers the best move that is allowed, and the best of all in case none is. Equals are drawn by lot. */
function offer(h: Hunt, v: number, at: number, option: number, estimate: number, forbidden: boolean): void {
  if (h.blind) estimate = 0; // every move alike: the lot decides
  const into = forbidden && estimate >= h.aspire ? h.any : h.best;
  if (estimate > into.estimate) return;
  if (estimate < into.estimate) into.ties = 0;
  else if (h.random() * (into.ties + 2) >= 1) {
    into.ties++;
    return;
  }
  into.ties++;
  into.v = v;
  into.at = at;
  into.option = option;
  into.estimate = estimate;
}

const endOf = (g: Graph, v: number): number => (v >= 0 ? g.head[v]! + g.minutes[v]! : 0);
const restOf = (g: Graph, v: number): number => (v >= 0 ? g.tail[v]! + g.minutes[v]! : 0);

/**
 * `u` right after `v`, both on one critical block (Balas and Vazacopoulos 1998). No cycle where the path from `v` is at
 * least as long as the one from the job's next operation. Estimates the longest path through the operations shifted.
 */
function forward(h: Hunt, u: number, v: number): void {
  const { js, g, tabu } = h;
  const after = js.after[u]!;
  if (after >= 0 && (after === v || restOf(g, v) < restOf(g, after))) return;
  let forbidden = false;
  let at = endOf(g, g.prev[u]!);
  let most = 0;
  // New heads from u's place on; new tails are needed from the back, so heads are kept in scratch.
  const list = scratchList;
  let n = 0;
  for (let x = g.next[u]!; ; x = g.next[x]!) {
    const head = Math.max(at, endOf(g, js.before[x]!), js.release[x]!);
    list[n] = x;
    scratchHead[n++] = head;
    at = head + g.minutes[x]!;
    if (tabu.pair[x * tabu.n + u]! > h.now) forbidden = true;
    if (x === v) break;
  }
  list[n] = u;
  scratchHead[n++] = Math.max(at, endOf(g, js.before[u]!), js.release[u]!);
  let rest = restOf(g, g.next[v]!);
  for (let i = n - 1; i >= 0; i--) {
    const x = list[i]!;
    const tail = Math.max(rest, restOf(g, js.after[x]!));
    most = Math.max(most, scratchHead[i]! + g.minutes[x]! + tail);
    rest = tail + g.minutes[x]!;
  }
  offer(h, u, v, g.option[u]!, most, forbidden);
}

/** `v` right before `u`: the mirror image. */
function backward(h: Hunt, u: number, v: number): void {
  const { js, g, tabu } = h;
  const before = js.before[v]!;
  if (before >= 0 && (before === u || endOf(g, u) < endOf(g, before))) return;
  let forbidden = false;
  const list = scratchList;
  let n = 1;
  list[0] = v;
  let at = Math.max(endOf(g, g.prev[u]!), endOf(g, before), js.release[v]!);
  scratchHead[0] = at;
  at += g.minutes[v]!;
  for (let x = u; x !== v; x = g.next[x]!) {
    const head = Math.max(at, endOf(g, js.before[x]!), js.release[x]!);
    list[n] = x;
    scratchHead[n++] = head;
    at = head + g.minutes[x]!;
    if (tabu.pair[v * tabu.n + x]! > h.now) forbidden = true;
  }
  let most = 0;
  let rest = restOf(g, g.next[v]!);
  for (let i = n - 1; i >= 0; i--) {
    const x = list[i]!;
    const tail = Math.max(rest, restOf(g, js.after[x]!));
    most = Math.max(most, scratchHead[i]! + g.minutes[x]! + tail);
    rest = tail + g.minutes[x]!;
  }
  offer(h, v, g.prev[u]!, g.option[v]!, most, forbidden);
}

/** `v` on its other machines, wherever that closes no cycle: before what starts late, after what ends early. */
function elsewhere(h: Hunt, v: number): void {
  const { js, g, tabu } = h;
  const ready = Math.max(endOf(g, js.before[v]!), js.release[v]!);
  const rest = restOf(g, js.after[v]!);
  const latest = js.after[v]! >= 0 ? endOf(g, js.after[v]!) : Infinity;
  const earliest = js.before[v]! >= 0 ? g.head[js.before[v]!]! : -1;
  for (let o = 0; o < js.places[v]!.length; o++) {
    const place = js.places[v]![o]!;
    if (place === g.place[v]) continue;
    const forbidden = tabu.machine[v * js.machines + place]! > h.now;
    const minutes = js.minutes[v]![o]!;
    for (let p = -1, x = g.first[place]!; ; p = x, x = g.next[x]!) {
      if (p >= 0 && (p === js.after[v] || g.head[p]! >= latest)) break;
      if (x < 0 || (x !== js.before[v] && endOf(g, x) > earliest)) {
        const estimate = Math.max(ready, endOf(g, p)) + minutes + Math.max(rest, restOf(g, x));
        offer(h, v, p, o, estimate, forbidden);
      }
      if (x < 0) break;
    }
  }
}

let scratchList = new Int32Array(64);
let scratchHead = new Int32Array(64);

/** Looks along one critical path, drawn by lot, for the best move. */
export function hunt(h: Hunt): void {
  const { js, g } = h;
  if (scratchList.length < js.operations + 1) {
    scratchList = new Int32Array(js.operations + 1);
    scratchHead = new Int32Array(js.operations + 1);
  }
  let v = -1;
  let count = 0;
  for (let x = 0; x < js.operations; x++)
    if (g.tail[x] === 0 && endOf(g, x) === g.length && h.random() * ++count < 1) v = x;
  // Walk back from the end; a block is a run of operations on one machine.
  let last = v;
  for (let x = v; x >= 0;) {
    if (js.places[x]!.length > 1) elsewhere(h, x);
    const p = g.prev[x]!;
    const b = js.before[x]!;
    const byMachine = p >= 0 && endOf(g, p) === g.head[x];
    const byJob = b >= 0 && endOf(g, b) === g.head[x];
    if (byMachine && (!byJob || h.random() < 0.5)) x = p;
    else {
      if (x !== last) block(h, x, last);
      x = byJob ? b : -1;
      last = x;
    }
  }
}

/** Every operation of the block to its ends, and its ends into it. */
function block(h: Hunt, first: number, last: number): void {
  const { g } = h;
  for (let x = first; x !== last; x = g.next[x]!) forward(h, x, last);
  for (let x = last; x !== first; x = g.prev[x]!) backward(h, first, x);
  for (let x = g.next[first]!; x !== last; x = g.next[x]!) forward(h, first, x);
  for (let x = g.prev[last]!; x !== first; x = g.prev[x]!) backward(h, x, last);
}

/** Makes a move and forbids its way back for `tenure` iterations. */
export function make(js: JobShop, g: Graph, tabu: Tabu, move: Best, until: number): void {
  const { v, at } = move;
  const from = g.place[v]!;
  const to = js.places[v]![move.option]!;
  if (to === from) {
    // What v jumps over: pairs in the old order are forbidden.
    let ahead = false;
    for (let x = g.next[v]!; x >= 0 && !ahead; x = g.next[x]!) if (x === at) ahead = true;
    if (ahead)
      for (let x = g.next[v]!; ; x = g.next[x]!) {
        tabu.pair[v * tabu.n + x] = until;
        if (x === at) break;
      }
    else for (let x = g.prev[v]!; x !== at && x >= 0; x = g.prev[x]!) tabu.pair[x * tabu.n + v] = until;
  } else tabu.machine[v * js.machines + from] = until;
  unlink(g, v);
  g.option[v] = move.option;
  g.place[v] = to;
  g.minutes[v] = js.minutes[v]![move.option]!;
  linkAfter(g, v, at);
}
