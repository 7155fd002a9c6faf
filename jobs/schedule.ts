import cron from 'node-cron';
import { enqueue } from '#server/db/tasks.ts';
import type { Deps } from '#server/deps.ts';

/** The day is the task's key: however many workers there are and however often they start, it is done once a day. */
export async function askForNightlyTasks(deps: Deps): Promise<void> {
  const day = deps.now().toISOString().slice(0, 10);
  await deps.db.transaction(async (trx) => {
    for (const kind of ['prune', 'sweep-files', 'look-at-people'] as const)
      await enqueue(trx, { kind, key: day, shopId: null, payload: {} });
  });
}

/** @returns a function that ends the schedule. What a machine that is off at night misses is asked for at its start. */
export async function startSchedule(deps: Deps): Promise<() => Promise<void>> {
  const ask = () =>
    askForNightlyTasks(deps).catch((error: unknown) =>
      deps.log.warn({ err: error }, 'the night’s tasks could not be asked for'),
    );
  const nightly = cron.schedule('20 3 * * *', ask, { timezone: 'UTC', name: 'nightly tasks' });
  await ask();
  return async () => {
    await nightly.destroy();
  };
}
