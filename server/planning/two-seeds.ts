import { availableParallelism, loadavg } from 'node:os';
import type { Plan, Progress } from '#planner/types.ts';
import type { PlannerThreads, PlanRequest, Search } from './planner-threads.ts';

/** Cores that had nothing to do in the last minute. */
const freeCores = (): number => Math.round(availableParallelism() - loadavg()[0]!);

/**
 * Searches from two seeds side by side where two cores are free, and answers with the better plan: on the same clock a
 * second seed is worth more than nothing and costs no one anything. A search counted in evaluations stays alone, so that
 * the same seed gives the same plan.
 */
export const twoSeeds = (threads: PlannerThreads, cores = freeCores): PlannerThreads => ({
  search: (request) =>
    request.evaluations === undefined && cores() >= 2 ? searchTwice(threads, request) : threads.search(request),
  close: () => threads.close(),
});

const isBetter = (one: Progress, two: Progress): boolean =>
  one.unplaced < two.unplaced || (one.unplaced === two.unplaced && one.cost < two.cost);

function searchTwice(threads: PlannerThreads, request: PlanRequest): Search {
  const tried = [0, 0];
  let best: Progress | null = null;
  const searches = tried.map((_, i) =>
    threads.search({
      ...request,
      seed: request.seed + i,
      onProgress: (progress) => {
        tried[i] = progress.evaluations;
        if (best !== null && !isBetter(progress, best)) return;
        best = progress;
        request.onProgress({ ...progress, evaluations: tried[0]! + tried[1]! });
      },
    }),
  );
  return {
    plan: betterOf(searches.map((search) => search.plan)),
    stop: () => searches.forEach((search) => search.stop()),
  };
}

/** One thread that died leaves the other's plan; rejects only where none came. */
async function betterOf(plans: readonly Promise<Plan>[]): Promise<Plan> {
  const ended = await Promise.allSettled(plans);
  const made = ended.flatMap((end) => (end.status === 'fulfilled' ? [end.value] : []));
  const first = made[0];
  if (!first) throw (ended[0] as PromiseRejectedResult).reason;
  const best = made.reduce((one, two) => (two.cost < one.cost ? two : one), first);
  const evaluations = made.reduce((sum, plan) => sum + plan.stats.evaluations, 0);
  return { ...best, stats: { ...best.stats, evaluations } };
}
