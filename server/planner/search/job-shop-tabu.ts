import { below, type Random } from '../random.ts';
import { copyGraph, type Graph, type JobShop, makeGraph, measure } from './job-shop.ts';
import { type Best, type Hunt, hunt, make, makeTabu } from './job-shop-moves.ts';

export type TabuRun = {
  /** Asked before each iteration. */
  over: () => boolean;
  /** Called with each shorter schedule. */
  onBetter: (g: Graph) => void;
};

/** Iterations without a shorter schedule after which the search goes back to one of its best and shakes it. */
const PATIENCE = 6000;
const ELITE = 6;

const fresh = (): Best => ({ v: -1, at: -1, option: 0, estimate: Infinity, ties: 0 });

/** Tabu search on critical paths, from the graph given; leaves the shortest schedule found in it. */
export function tabuSearch(js: JobShop, start: Graph, random: Random, run: TabuRun): void {
  const g = makeGraph(js);
  copyGraph(start, g);
  const elite: Graph[] = [];
  const best = start;
  const base = 8 + Math.round(js.operations / Math.max(1, js.machines) / 2);
  let tabu = makeTabu(js);
  let local = g.length;
  let since = 0;
  const h: Hunt = { js, g, tabu, now: 0, aspire: g.length, random, best: fresh(), any: fresh(), blind: false };
  while (!run.over()) {
    h.now++;
    h.aspire = local;
    h.best = fresh();
    h.any = fresh();
    hunt(h);
    const move = h.best.v >= 0 ? h.best : h.any;
    if (move.v < 0) return; // one critical operation after the other in one job: it cannot be shorter
    make(js, g, tabu, move, h.now + base + below(random, base));
    if (!measure(js, g)) throw new Error('job shop: a move closed a cycle');
    if (g.length < local) {
      local = g.length;
      since = 0;
      if (g.length < best.length) {
        copyGraph(g, best);
        run.onBetter(best);
      }
      enroll(js, elite, g);
    } else if (++since > PATIENCE) {
      copyGraph(elite.length ? elite[below(random, elite.length)]! : best, g);
      shake(js, g, random);
      local = g.length;
      since = 0;
      tabu = makeTabu(js);
      h.tabu = tabu;
    }
  }
}

/** Keeps the shortest schedules. */
function enroll(js: JobShop, elite: Graph[], g: Graph): void {
  if (elite.length === ELITE && elite[ELITE - 1]!.length <= g.length) return;
  const kept = elite.length === ELITE ? elite.pop()! : makeGraph(js);
  copyGraph(g, kept);
  elite.push(kept);
  elite.sort((x, y) => x.length - y.length);
}

/** A few critical moves drawn by lot, none of them taken back. */
function shake(js: JobShop, g: Graph, random: Random): void {
  const tabu = makeTabu(js);
  for (let n = 6 + below(random, 14); n > 0; n--) {
    const h: Hunt = { js, g, tabu, now: 0, aspire: -1, random, best: fresh(), any: fresh(), blind: true };
    hunt(h);
    if (h.best.v < 0) return;
    make(js, g, tabu, h.best, 1);
    if (!measure(js, g)) throw new Error('job shop: a move closed a cycle');
  }
}
