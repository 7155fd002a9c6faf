import type { Knex } from 'knex';
import type { Trx } from './in-shop.ts';
import type { TaskKind } from './tasks.ts';

export type Task = {
  id: string;
  kind: TaskKind;
  shopId: string | null;
  payload: unknown;
  /** How often it was begun, this time included. */
  attempts: number;
};

/**
 * Chooses a due task and counts the attempt at once, in a transaction of its own: a task that kills its worker each time
 * is given up in the end. Nobody else chooses it in the three seconds that `holdTask` has to take its row.
 */
export async function beginTask(db: Knex, kinds: readonly TaskKind[]): Promise<Task | undefined> {
  const { rows } = await db.raw<{ rows: Task[] }>(
    `update task set attempts = attempts + 1, run_at = now() + interval '3 seconds'
     where id = (
       select id from task
       where kind = any(?) and done_at is null and dead_at is null and run_at <= now()
       order by run_at, id limit 1 for update skip locked)
     returning id, kind, shop_id as "shopId", payload, attempts`,
    [[...kinds]],
  );
  return rows[0];
}

/**
 * Holds the task's row until the transaction ends, however long the work takes; when the worker dies the lock goes with it and
 * another may take the task at once. False where somebody else was faster.
 */
export async function holdTask(trx: Trx, task: Task): Promise<boolean> {
  await trx.raw(`set local idle_in_transaction_session_timeout = 0`);
  const held = await trx('task')
    .where({ id: task.id, attempts: task.attempts, done_at: null, dead_at: null })
    .forUpdate()
    .skipLocked()
    .select<{ id: string }[]>('id');
  return held.length === 1;
}

export async function finishTask(trx: Trx, id: string): Promise<void> {
  await trx('task').where({ id }).update({ done_at: trx.fn.now(), last_error: null });
}

export async function postponeTask(trx: Trx, id: string, milliseconds: number, error: string): Promise<void> {
  await trx('task')
    .where({ id })
    .update({ run_at: trx.raw(`now() + ? * interval '1 millisecond'`, [Math.round(milliseconds)]), last_error: error });
}

export async function buryTask(trx: Trx, id: string, error: string): Promise<void> {
  await trx('task').where({ id }).update({ dead_at: trx.fn.now(), last_error: error });
}
