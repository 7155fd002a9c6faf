import { lowerBounds } from '../bounds.ts';
import type { Decoder } from '../engine/decode.ts';
import { blocksInOrder, jobOrders, runningFirst } from '../engine/orders.ts';
import { OUT } from '../engine/run-cost.ts';
import type { Shop } from '../engine/shop.ts';
import { makeRandom, type Random } from '../random.ts';
import type { PlanOptions, Stats } from '../types.ts';
import { anneal } from './anneal.ts';
import { asJobShop, isNoWait } from './job-shop.ts';
import { planNoWait } from './no-wait.ts';
import { planJobShop } from './plan-job-shop.ts';
import { makeSearch, type Search, startFrom } from './candidate.ts';
import { costShown, type Kept, keepHeld, makeKept, standOn } from './kept.ts';
import { placePublished, undisturbed } from './published.ts';

export type Found = { d: Decoder; bound: number; stats: Stats };

/** Looks at the clock only every so many evaluations; large shops, whose evaluations take long, after each. */
const LOOK = 16;
const LARGE = 100;
/** Most evaluations of a repair, and most of the whole budget. */
const REPAIR = 2000;
const REPAIR_SHARE = 0.4;
/** Evaluations of the first round where nobody says when the end comes; each next one is twice as long. */
const FIRST_ROUND = 4000;
/** Evaluations that a round of a small shop should have. */
const ENOUGH = 40_000;

type Run = {
  s: Search;
  options: PlanOptions;
  random: Random;
  bound: number;
  best: Kept;
  improvements: number;
  over: boolean;
};

/** Builds first plans by rules of thumb, then anneals in rounds from the best. Ends early where the bound is met. */
export function searchPlan(shop: Shop, options: PlanOptions): Found {
  const bounds = lowerBounds(shop);
  const s = makeSearch(shop, bounds.alone);
  const run: Run = {
    s,
    options,
    random: makeRandom(options.seed),
    bound: bounds.cost,
    best: makeKept(s),
    improvements: 0,
    over: false,
  };
  // The first plan is finished whatever the clock says; what follows may be given up in the middle.
  s.halt = () => run.best.cost < Infinity && options.stop?.() === true;
  firstPlans(run);
  if (!isOver(run)) searchOn(run);
  standOn(s, run.best);
  return { d: s.d, bound: run.bound, stats: { evaluations: s.evaluations, improvements: run.improvements } };
}

/** The search that the structure of the problem asks for. */
function searchOn(run: Run): void {
  const { s, random } = run;
  const { shop } = s.d;
  const jobShop = asJobShop(shop);
  const over = (): boolean => isOver(run);
  const better = (): void => keep(run);
  standOn(s, run.best);
  if (run.best.cost < OUT && jobShop) planJobShop(s, jobShop, random, over, better);
  else if (run.best.cost < OUT && isNoWait(shop)) planNoWait(s, random, over, better);
  else rounds(run);
}

/** Whether the search has to end: budget, stop, or nothing left to gain. */
function isOver(run: Run): boolean {
  const { s, options } = run;
  if (run.over) return true;
  const spent = s.evaluations >= (options.evaluations ?? Infinity);
  const look = s.order.length > LARGE || s.evaluations % LOOK === 0;
  const stopped = look && options.stop?.() === true;
  const proved = run.best.cost <= run.bound + 1e-9;
  const endless = options.evaluations === undefined && options.stop === undefined;
  run.over = spent || stopped || proved || endless;
  return run.over;
}

/** Keeps the search's schedule if it is the best so far. */
function keep(run: Run): void {
  const { s, best } = run;
  if (s.cost >= best.cost - 1e-9) return;
  run.improvements++;
  keepHeld(s, best);
  const unplaced = best.out.reduce((x, y) => x + y, 0);
  run.options.onProgress?.({ cost: costShown(best), bound: run.bound, evaluations: s.evaluations, unplaced });
}

function firstPlans(run: Run): void {
  const { s } = run;
  const { shop } = s.d;
  if (shop.problem.baseline.length > 0) {
    repair(run);
    // A plan made from nothing moves everything.
    if (run.best.cost < OUT && shop.problem.objective.moves > 0) return;
  }
  for (const jobs of jobOrders(shop)) {
    if (run.best.cost < Infinity && isOver(run)) return;
    let order = runningFirst(shop, jobs);
    for (let round = 0; round < 4; round++) {
      startFrom(s, blocksInOrder(shop, order));
      keep(run);
      const out = order.filter((j) => s.heldOut[j]);
      if (out.length === 0 || isOver(run)) break;
      order = [...out, ...order.filter((j) => !s.heldOut[j])]; // who found no room goes first
    }
  }
}

/**
 * Stands on the published plan, as far as it still can, and where moving costs mends it before anything is made anew:
 * jobs without room first, then by small steps back to where things stood.
 */
function repair(run: Run): void {
  const { s } = run;
  const stands = undisturbed(s);
  for (const disturbedFirst of [false, true]) {
    placePublished(s, stands, disturbedFirst);
    keep(run);
  }
  const { moves } = s.d.shop.problem.objective;
  if (moves === 0 || isOver(run)) return;
  standOn(s, run.best);
  const begun = s.evaluations;
  const share = (): number => Math.max((s.evaluations - begun) / REPAIR, (shareGone(run) ?? 0) / REPAIR_SHARE);
  anneal(s, run.random, {
    share: () => (isOver(run) ? 1 : share()),
    hot: 2 * moves,
    cold: moves / 20,
    onBetter: () => keep(run),
  });
}

/** Share of the whole budget that is gone; null where nobody knows the end. */
function shareGone(run: Run): number | null {
  const { options, s } = run;
  if (options.share) return options.share();
  return options.evaluations === undefined ? null : s.evaluations / options.evaluations;
}

/**
 * The temperature to begin with. Tardiness comes in jumps of a night, some 900 minutes; a fifth of that, and falling,
 * lets the search cross them while the rest of the schedule keeps its shape. Without due dates: by the cost itself.
 */
function heatOf({ s, best }: Run): number {
  const w = s.d.shop.problem.objective;
  // Where moving costs, hotter would move everything.
  if (w.moves > 0 && s.d.shop.problem.baseline.length > 0) return Math.min(5 * w.moves, 200 * w.tardiness || Infinity);
  return w.tardiness > 0 ? 200 * w.tardiness : Math.max(1e-3, 0.02 * Math.abs(costShown(best)));
}

/**
 * Into how many rounds a run is cut whose end is known: small shops, which have cooled down long before it, begin again
 * from other orders.
 */
function roundsFor({ s }: Run, share: number): number {
  const evaluations = share > 0 ? s.evaluations / share : 0;
  return s.order.length > 60 ? 1 : Math.max(1, Math.min(8, Math.floor(evaluations / ENOUGH)));
}

/** Anneals: one long run or a few where the end is known, else in rounds that grow, each from the best so far. */
function rounds(run: Run): void {
  const { s } = run;
  if (s.d.shop.blocks.length < 2) return;
  const known = shareGone(run);
  const count = known === null ? 0 : roundsFor(run, known);
  for (let round = 0; !isOver(run); round++) {
    if (round % 2 === 1 && round < count - 1) startFrom(s, shuffled(run));
    else standOn(s, run.best);
    // Of several rounds the first forms no loads: what it finds is what the others have to better.
    s.forms = s.d.shop.shares && (round > 0 || count === 1);
    const from = shareGone(run);
    const until = known === null || round >= count ? 1 : known + ((1 - known) * (round + 1)) / count;
    anneal(s, run.random, {
      share: from === null ? shareOfRound(run, round) : shareOfTime(run, from, until),
      hot: heatOf(run),
      cold: heatOf(run) / 200,
      onBetter: () => keep(run),
    });
  }
}

function shareOfRound(run: Run, round: number): () => number {
  const begun = run.s.evaluations;
  const length = FIRST_ROUND * 2 ** round;
  return () => (isOver(run) ? 1 : (run.s.evaluations - begun) / length);
}

function shareOfTime(run: Run, from: number, until: number): () => number {
  let share = 0;
  let tick = 0;
  return () => {
    if (isOver(run)) return 1;
    if (tick++ % LOOK === 0) share = ((shareGone(run) ?? 1) - from) / Math.max(1e-9, until - from);
    return share;
  };
}

/** All jobs in an order drawn by lot. */
function shuffled({ s, random }: Run): Int32Array {
  const { shop } = s.d;
  const jobs = shop.jobs.map((_, j) => ({ j, lot: random() })).sort((x, y) => x.lot - y.lot);
  return blocksInOrder(
    shop,
    jobs.map((x) => x.j),
  );
}
