import type { Decoder } from './decode.ts';
import { BOOTH } from './shop.ts';

/** Weight of a job without room, on top of the problem's own: a plan that leaves nothing out always comes first. */
export const OUT = 1e9;

/** The cost of what stands now, like `checkPlan` counts it, with `OUT` for each job left out. */
export function costNow(d: Decoder): number {
  const { shop, state } = d;
  const { at } = state;
  const w = shop.problem.objective;
  let cost = 0;
  let end = 0;
  shop.jobs.forEach((job, j) => {
    if (d.out[j]) cost += OUT + w.unplaced * job.weight;
    else {
      const last = at.end[job.last]!;
      if (job.due >= 0 && last > job.due) cost += w.tardiness * job.weight * (last - job.due);
      cost += w.flow * job.weight * (last - job.release);
      if (last > end) end = last;
    }
  });
  cost += w.makespan * end;
  if (w.booth > 0 || w.moves > 0)
    for (let s = 0; s < shop.stageCount; s++) {
      if (!at.way[s]) continue;
      if (shop.placeKind[at.place[s]!] === BOOTH) cost += w.booth * (at.holdTo[s]! - at.holdFrom[s]!);
      if (shop.basePlace[s]! >= 0 && moved(d, s)) cost += w.moves;
    }
  return cost;
}

export const moved = (d: Decoder, s: number): boolean => {
  const { at } = d.state;
  const { basePlace, basePerson, baseStart } = d.shop;
  return at.place[s] !== basePlace[s] || at.person[s] !== basePerson[s] || at.start[s] !== baseStart[s];
};
