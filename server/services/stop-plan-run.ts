import type { PlanRun } from '#contracts/day.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { changePlanRun, findPlanRun, planRunView } from '../db/plan-runs.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import type { Actor } from '../policies.ts';

/**
 * Ends a run: one that searches keeps the best plan found so far, one that has not begun makes none. Stopping what is
 * over changes nothing.
 * @throws {Refusal} not-found
 */
export function stopPlanRun(deps: Deps, actor: Actor, runId: string): Promise<PlanRun> {
  return inShop(deps.db, actor, async (trx) => {
    const run = await findPlanRun(trx, actor.shopId, runId, { lock: true });
    if (!run) throw notFound();
    if (run.stopRequested || (run.state !== 'queued' && run.state !== 'running')) return planRunView(run);
    const over = run.state === 'queued' ? { state: 'stopped' as const, finishedAt: deps.now() } : {};
    await changePlanRun(trx, actor.shopId, runId, { stopRequested: true, ...over });
    await recordChange(trx, actor, { kind: 'plan-run', ids: [runId] });
    return planRunView({ ...run, stopRequested: true, ...over });
  });
}
