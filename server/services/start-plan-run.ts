import type { PlanRun } from '#contracts/day.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { findPlanRun, insertPlanRun, planRunView } from '../db/plan-runs.ts';
import { enqueue } from '../db/tasks.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';

export type RunInput = { id: string; scope: 'all' | 'rest'; seconds: number; seed: number };

/**
 * Asks the planner for a draft. The same id again answers with the same run.
 * @throws {Refusal} too-many while another run of the shop is under way.
 */
export function startPlanRun(deps: Deps, actor: Actor, input: RunInput): Promise<PlanRun> {
  return inShop(deps.db, actor, async (trx) => {
    const made = await insertPlanRun(trx, actor.shopId, { ...input, requestedBy: actor.accountId, now: deps.now() });
    const run = await findPlanRun(trx, actor.shopId, input.id);
    if (!run) throw new Refusal('too-many', { retryAfterSeconds: 5 });
    if (made) {
      await enqueue(trx, { kind: 'run-plan', key: run.id, shopId: actor.shopId, payload: { runId: run.id } });
      await recordChange(trx, actor, { kind: 'plan-run', ids: [run.id] });
    }
    return planRunView(run);
  });
}
