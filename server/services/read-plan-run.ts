import type { PlanRun } from '#contracts/day.ts';
import { inShop } from '../db/in-shop.ts';
import { findPlanRun, planRunView } from '../db/plan-runs.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import type { Actor } from '../policies.ts';

/** @throws {Refusal} not-found */
export function readPlanRun(deps: Deps, actor: Actor, runId: string): Promise<PlanRun> {
  return inShop(deps.db, actor, async (trx) => {
    const run = await findPlanRun(trx, actor.shopId, runId);
    if (!run) throw notFound();
    return planRunView(run);
  });
}
