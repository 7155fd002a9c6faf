import type { Knex } from 'knex';
import { connect } from '#server/db/connect.ts';
import { beginTask, buryTask, finishTask, holdTask, postponeTask, type Task } from '#server/db/task-queue.ts';
import { TASK_CHANNEL, type TaskKind } from '#server/db/tasks.ts';
import type { Trx } from '#server/db/in-shop.ts';
import { listen } from '#server/realtime/listener.ts';
import { makeBell } from './bell.ts';
import type { Lane } from './registry.ts';
import { GiveUp, type JobDeps, type TaskDefinition } from './task-function.ts';
import { messageOf } from './tasks/deliver.ts';

type Registry = Partial<Record<TaskKind, TaskDefinition>>;

export type WorkerOptions = {
  registry: Registry;
  lanes: readonly Lane[];
  /** Milliseconds to the next attempt after this many. */
  retryDelay: (attempts: number) => number;
  /** How long to sleep when nothing is due; a NOTIFY wakes earlier. */
  pollEvery: number;
};

/** 10 s, 20 s, 40 s, ... at most an hour, each between half and one and a half of it, so that failures do not march in step. */
export const growingDelay = (attempts: number): number =>
  Math.min(10_000 * 2 ** (attempts - 1), 3_600_000) * (0.5 + Math.random());

/** @returns a function that stops taking tasks, tells those under way, and resolves once they have ended */
export function startWorker(deps: JobDeps, options: WorkerOptions): () => Promise<void> {
  const stopping = new AbortController();
  // Held tasks have connections of their own: work never waits for one that waiting work holds.
  const queue = connect(
    deps.config.DATABASE_URL,
    options.lanes.reduce((sum, lane) => sum + lane.runners, 0),
  );
  const bell = makeBell();
  const listener = listen({
    url: deps.config.DATABASE_URL,
    channels: [TASK_CHANNEL],
    log: deps.log,
    onNotice: bell.ring,
    onListening: bell.ring,
  });
  const runner = async (kinds: readonly TaskKind[]) => {
    while (!stopping.signal.aborted) {
      const heard = bell.next();
      const found = await runOne(queue, deps, options, kinds, stopping.signal).catch((error: unknown) => {
        deps.log.warn({ err: error }, 'the queue is out of reach');
        return false;
      });
      if (!found) await bell.ringOr(heard, options.pollEvery, stopping.signal);
    }
  };
  const runners = options.lanes.flatMap((lane) =>
    Array.from({ length: lane.runners }, () => runner(known(lane.kinds))),
  );
  function known(kinds: readonly TaskKind[]): TaskKind[] {
    return kinds.filter((kind) => options.registry[kind] !== undefined);
  }
  return async () => {
    stopping.abort();
    await Promise.all([...runners, listener.close()]);
    await queue.destroy();
  };
}

/** Takes one due task and does it. @returns false where none is due */
async function runOne(
  queue: Knex,
  deps: JobDeps,
  options: WorkerOptions,
  kinds: readonly TaskKind[],
  signal: AbortSignal,
): Promise<boolean> {
  if (kinds.length === 0) return false;
  const task = await beginTask(queue, kinds);
  if (!task) return false;
  const definition = options.registry[task.kind];
  if (!definition) return false;
  await queue.transaction(async (trx) => {
    if (await holdTask(trx, task)) await doHeld(deps, options, definition, { trx, task, signal });
  });
  return true;
}

type Held = { trx: Trx; task: Task; signal: AbortSignal };

async function doHeld(deps: JobDeps, options: WorkerOptions, definition: TaskDefinition, held: Held): Promise<void> {
  const { trx, task, signal } = held;
  const log = deps.log.child({ task: task.id, kind: task.kind, attempt: task.attempts });
  try {
    // One more than allowed was begun: the last one took its worker with it.
    if (task.attempts > definition.attempts) throw new GiveUp('its worker died each time');
    await definition.run(deps, task, signal);
    await finishTask(trx, task.id);
    log.info('task done');
  } catch (error) {
    if (signal.aborted) return log.info('task left to the next worker');
    const message = messageOf(error);
    if (error instanceof GiveUp || task.attempts >= definition.attempts) {
      log.error({ err: error }, 'task given up');
      await definition.onDead?.(deps, task, message);
      await buryTask(trx, task.id, message);
    } else {
      log.warn({ err: error }, 'task failed, tried again later');
      await postponeTask(trx, task.id, options.retryDelay(task.attempts), message);
    }
  }
}
