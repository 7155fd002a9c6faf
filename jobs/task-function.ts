import type { Deps } from '#server/deps.ts';
import type { Task } from '#server/db/task-queue.ts';
import type { Mailer } from '#server/mail/mailer.ts';

/** `mailer` is null where no mail server is set; the lanes that send letters then stand still. */
export type JobDeps = Deps & { mailer: Mailer | null };

/**
 * What a kind of task does. It may be run again after a crash at any point, so each must be safe to run twice. `signal` is given when
 * the worker stops: work that takes long lets go, and is done anew by the next worker.
 */
export type TaskFunction = (deps: JobDeps, task: Task, signal: AbortSignal) => Promise<void>;

export type TaskDefinition = {
  run: TaskFunction;
  /** After this many attempts it is given up. */
  attempts: number;
  /** Told once when it is given up, with what went wrong last. */
  onDead?: (deps: JobDeps, task: Task, error: string) => Promise<void>;
};

/** For an error that no further attempt will cure. */
export class GiveUp extends Error {}

/** @throws where the queue holds a task of a shop without its shop: a fault of ours */
export function shopOf(task: Task): string {
  if (task.shopId === null) throw new GiveUp(`task ${task.id} of kind ${task.kind} has no shop`);
  return task.shopId;
}
