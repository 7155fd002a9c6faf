import { availableParallelism } from 'node:os';
import { Worker } from 'node:worker_threads';
import type { Plan, Problem, Progress } from '#planner/types.ts';
import type { PlanMessage, PlanOrder } from './thread-messages.ts';

export type PlanRequest = {
  problem: Problem;
  seed: number;
  seconds: number;
  /** Ends the search after so many tries even where time is left: same seed, same plan. */
  evaluations?: number;
  onProgress: (progress: Progress) => void;
};

/** A search that is under way. `stop` ends it with the best so far. `plan` rejects where the thread dies. */
export type Search = { plan: Promise<Plan>; stop(): void };

/** Planning threads, started when first needed and kept: starting one takes longer than many a plan. */
export type PlannerThreads = { search(request: PlanRequest): Search; close(): Promise<void> };

export class PlannerThreadDied extends Error {}

/** @param most threads at once; further searches wait for one to fall free */
export function openPlannerThreads(
  most = Math.max(1, availableParallelism() - 1),
  start = startThread,
): PlannerThreads {
  const idle: Worker[] = [];
  const all = new Set<Worker>();
  const waiting: ((worker: Worker) => void)[] = [];
  let closed = false;

  const add = (): Worker => {
    const worker = start();
    all.add(worker);
    const gone = (): void => {
      if (!all.delete(worker)) return;
      const at = idle.indexOf(worker);
      if (at >= 0) idle.splice(at, 1);
      if (!closed) waiting.shift()?.(add());
    };
    worker.once('error', gone).once('exit', gone);
    return worker;
  };
  const take = (): Promise<Worker> => {
    if (closed) return Promise.reject(new PlannerThreadDied('The planning threads are closed.'));
    const worker = idle.pop() ?? (all.size < most ? add() : undefined);
    return worker ? Promise.resolve(worker) : new Promise((resolve) => waiting.push(resolve));
  };
  const giveBack = (worker: Worker): void => {
    if (!all.has(worker)) return;
    const next = waiting.shift();
    if (next) next(worker);
    else idle.push(worker);
  };

  return {
    search({ onProgress, seconds, problem, seed, evaluations }) {
      const flags = new SharedArrayBuffer(4);
      const order: PlanOrder = {
        problem,
        seed,
        milliseconds: seconds * 1000,
        flags,
        ...(evaluations === undefined ? {} : { evaluations }),
      };
      const work = async (): Promise<Plan> => {
        const worker = await take();
        try {
          return await askThread(worker, order, onProgress);
        } finally {
          giveBack(worker);
        }
      };
      return { plan: work(), stop: () => void Atomics.store(new Int32Array(flags), 0, 1) };
    },
    async close() {
      closed = true;
      await Promise.all([...all].map((worker) => worker.terminate()));
    },
  };
}

function askThread(worker: Worker, order: PlanOrder, onProgress: (progress: Progress) => void): Promise<Plan> {
  return new Promise((resolve, reject) => {
    const done = (): void => {
      worker.off('message', onMessage).off('error', onError).off('exit', onExit);
    };
    const onMessage = (message: PlanMessage): void => {
      if (message.kind === 'progress') return onProgress(message.progress);
      done();
      resolve(message.plan);
    };
    const fail = (why: string, cause?: unknown): void => {
      done();
      reject(new PlannerThreadDied(why, { cause }));
    };
    const onError = (error: unknown): void => fail('The planning thread failed.', error);
    const onExit = (code: number): void => fail(`The planning thread ended with code ${code}.`);
    worker.on('message', onMessage).on('error', onError).on('exit', onExit);
    worker.postMessage(order);
  });
}

/** From the sources through tsx, from the built program as the file beside it. */
function startThread(): Worker {
  const worker = import.meta.url.endsWith('.ts')
    ? new Worker(new URL('./worker-boot.mjs', import.meta.url), { workerData: { entry: './plan.worker.ts' } })
    : new Worker(new URL('./plan.worker.js', import.meta.url));
  // An idle thread keeps no process alive.
  worker.unref();
  return worker;
}
