import type { Knex } from 'knex';
import { v7 as uuid } from 'uuid';

export const TASK_CHANNEL = 'ovenbird_task';

export type TaskKind =
  | 'send-letter'
  | 'send-reset'
  | 'send-invitation'
  | 'send-sign-up'
  | 'run-plan'
  | 'reset-demo'
  | 'look-at-people'
  | 'prune'
  | 'sweep-files';

/**
 * Queues background work in the caller's transaction: it exists if and only if that commits. The same kind and key is
 * queued once, however often it is asked for. Payloads carry ids, never content.
 */
export async function enqueue(
  trx: Knex,
  task: { kind: TaskKind; key: string; shopId: string | null; payload: Record<string, string | number> },
): Promise<void> {
  await trx('task')
    .insert({ id: uuid(), kind: task.kind, key: task.key, shop_id: task.shopId, payload: JSON.stringify(task.payload) })
    .onConflict(['kind', 'key'])
    .ignore();
  await trx.raw(`select pg_notify(?, '')`, [TASK_CHANNEL]);
}
