import type { PlanView } from './plan-view.ts';
import type { CostParts, Objective } from './types.ts';

export const COST_KEYS: readonly (keyof Objective)[] = ['tardiness', 'flow', 'makespan', 'booth', 'moves', 'unplaced'];

/** The measures that the objective weighs: weighted minutes late and in the shop, last end, booth minutes, moves, weight left out. */
export function costParts(view: PlanView): CostParts {
  const parts: CostParts = { tardiness: 0, flow: 0, makespan: 0, booth: 0, moves: 0, unplaced: 0 };
  const unplaced = new Set(view.plan.unplaced.map((u) => u.job));
  for (const job of view.problem.jobs) {
    if (unplaced.has(job.id)) {
      parts.unplaced += job.weight;
      continue;
    }
    const last = view.given.get(job.stages[job.stages.length - 1]?.id ?? '');
    if (!last) continue;
    if (job.due !== null) parts.tardiness += job.weight * Math.max(0, last.end - job.due);
    parts.flow += job.weight * (last.end - job.release);
    parts.makespan = Math.max(parts.makespan, last.end);
  }
  for (const h of view.holds) if (view.places.get(h.place)?.kind === 'booth') parts.booth += h.to - h.from;
  for (const b of view.problem.baseline) {
    const a = view.given.get(b.stage);
    const moved = a && (a.place !== b.place || a.person !== b.person || a.start !== b.start);
    if (moved && !view.fixed.has(b.stage)) parts.moves += 1;
  }
  return parts;
}

export const weigh = (parts: CostParts, objective: Objective): number =>
  COST_KEYS.reduce((sum, key) => sum + objective[key] * parts[key], 0);
