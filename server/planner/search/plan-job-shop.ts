import type { Random } from '../random.ts';
import { attempt, type Search, sortByStart } from './candidate.ts';
import { type Graph, type JobShop, linkAfter, makeGraph, measure } from './job-shop.ts';
import { tabuSearch } from './job-shop-tabu.ts';

/** The sequences of the schedule that the search stands on. */
function graphOf(s: Search, js: JobShop): Graph {
  const g = makeGraph(js);
  const { place, start, way } = s.heldPlacing;
  const last = new Int32Array(js.machines).fill(-1);
  const operations = Int32Array.from(Array(js.operations).keys()).sort((x, y) => start[x]! - start[y]! || x - y);
  for (const v of operations) {
    const option = js.places[v]!.findIndex((p, o) => p === place[v] && js.ways[v]![o] === way[v]);
    g.option[v] = option;
    g.place[v] = js.places[v]![option]!;
    g.minutes[v] = js.minutes[v]![option]!;
    linkAfter(g, v, last[g.place[v]]!);
    last[g.place[v]] = v;
  }
  measure(js, g);
  return g;
}

/** Decodes sequences: every operation as they have it, in the order of its start. */
function standOnGraph(s: Search, js: JobShop, g: Graph): void {
  const { d } = s;
  const { shop } = d;
  const by = (id: number): number => g.head[shop.blocks[id]!.first]!;
  s.order.set([...s.order].sort((x, y) => by(x) - by(y) || x - y));
  for (const { id, first, variants } of shop.blocks) {
    const way = js.ways[first]![g.option[first]!]!;
    d.choice[id] = variants.findIndex((v) => v.ways[0] === way);
    d.spotOf[first] = g.place[first]!;
  }
  attempt(s, 0, Infinity);
  sortByStart(s);
}

/** Searches a job shop by its critical paths. The search stands on the best schedule afterwards. */
export function planJobShop(s: Search, js: JobShop, random: Random, over: () => boolean, keep: () => void): void {
  const best = graphOf(s, js);
  tabuSearch(js, best, random, {
    over: () => {
      s.evaluations++;
      return over();
    },
    onBetter: (g) => {
      standOnGraph(s, js, g);
      keep();
    },
  });
}
