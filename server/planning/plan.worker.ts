import { parentPort } from 'node:worker_threads';
import { closingMilliseconds, plan } from '#planner/index.ts';
import type { PlanMessage, PlanOrder } from './thread-messages.ts';

/** A thread of its own for the planner, so that a search never holds up anything else. One order at a time. */
const port = parentPort;
if (!port) throw new Error('plan.worker runs in a worker thread only.');

const say = (message: PlanMessage): void => port.postMessage(message);

port.on('message', ({ problem, seed, milliseconds, evaluations, flags }: PlanOrder) => {
  const stopped = new Int32Array(flags);
  const begun = performance.now();
  const searching = Math.max(milliseconds / 2, milliseconds - closingMilliseconds(problem));
  const share = (): number => Math.min(1, (performance.now() - begun) / searching);
  const made = plan(problem, {
    seed,
    // Counted in evaluations it must come out the same whatever the clock says.
    ...(evaluations === undefined ? { share } : { evaluations }),
    stop: () => Atomics.load(stopped, 0) !== 0 || share() >= 1,
    onProgress: (progress) => say({ kind: 'progress', progress }),
  });
  say({ kind: 'plan', plan: made });
});
