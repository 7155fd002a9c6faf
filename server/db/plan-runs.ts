import type { PlanRun } from '#contracts/day.ts';
import type { Trx } from './in-shop.ts';

export type RunState = PlanRun['state'];
export type RunRow = {
  id: string;
  state: RunState;
  scope: 'all' | 'rest';
  seed: number;
  seconds: number;
  stopRequested: boolean;
  progress: PlanRun['progress'];
  failure: string | null;
  requestedBy: string | null;
  startedAt: Date | null;
  finishedAt: Date | null;
};

const columns = {
  id: 'id',
  state: 'state',
  scope: 'scope',
  seed: 'seed',
  seconds: 'seconds',
  stopRequested: 'stop_requested',
  progress: 'progress',
  failure: 'failure',
  requestedBy: 'requested_by',
  startedAt: 'started_at',
  finishedAt: 'finished_at',
} as const;

/** False where the id is known already or another run of the shop is under way: the indexes decide, also in a race. */
export async function insertPlanRun(
  trx: Trx,
  shopId: string,
  run: { id: string; scope: 'all' | 'rest'; seed: number; seconds: number; requestedBy: string | null; now: Date },
): Promise<boolean> {
  const rows = (await trx('plan_run')
    .insert({
      shop_id: shopId,
      id: run.id,
      scope: run.scope,
      seed: run.seed,
      seconds: run.seconds,
      requested_by: run.requestedBy,
      created_at: run.now,
    })
    .onConflict()
    .ignore()
    .returning('id')) as unknown[];
  return rows.length === 1;
}

export async function findPlanRun(
  trx: Trx,
  shopId: string,
  id: string,
  { lock }: { lock: boolean } = { lock: false },
): Promise<RunRow | undefined> {
  const query = trx('plan_run').where({ shop_id: shopId, id }).select<RunRow[]>(columns);
  return (await (lock ? query.forUpdate() : query))[0];
}

export async function changePlanRun(
  trx: Trx,
  shopId: string,
  id: string,
  change: Partial<Pick<RunRow, 'state' | 'failure' | 'progress' | 'startedAt' | 'finishedAt' | 'stopRequested'>> & {
    draftId?: string;
  },
): Promise<void> {
  await trx('plan_run')
    .where({ shop_id: shopId, id })
    .update({
      ...(change.state && { state: change.state }),
      ...(change.failure !== undefined && { failure: change.failure }),
      ...(change.progress !== undefined && { progress: JSON.stringify(change.progress) }),
      ...(change.startedAt !== undefined && { started_at: change.startedAt }),
      ...(change.finishedAt !== undefined && { finished_at: change.finishedAt }),
      ...(change.stopRequested !== undefined && { stop_requested: change.stopRequested }),
      ...(change.draftId !== undefined && { draft_id: change.draftId }),
    });
}

export const planRunView = (run: RunRow): PlanRun => ({
  id: run.id,
  state: run.state,
  scope: run.scope,
  progress: run.progress,
  failure: run.failure,
  seconds: run.seconds,
  startedAt: run.startedAt?.toISOString() ?? null,
  finishedAt: run.finishedAt?.toISOString() ?? null,
});
