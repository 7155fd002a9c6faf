import type { Job } from '#contracts/jobs.ts';
import { cancelBookingsOfJob, dropDraftItemsOfJob } from '../db/bookings-of-job.ts';
import { recordChange } from '../db/changes.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { findJob, lockJob, setJobState } from '../db/jobs.ts';
import { lockStagesOf, stagesOfJob } from '../db/stages.ts';
import { tryAgain } from '../db/try-again.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { jobInShop } from './read-job.ts';
import { jobRefused } from './refuse-job.ts';

/**
 * Takes a job out of the work. Its planned bookings are cancelled and what they held falls free in the same
 * transaction; what was done stays on record. Withdrawing twice is withdrawing once.
 * @throws {Refusal} not-found, stale with the job as it is now, refused where it is done or somebody works on it.
 */
export function withdrawJob(deps: Deps, actor: Actor, jobId: string, version: number): Promise<Job> {
  return tryAgain(() => inShop(deps.db, actor, (trx) => withdraw(trx, actor, { id: jobId, version }, deps.now())));
}

async function withdraw(trx: Trx, actor: Actor, seen: { id: string; version: number }, now: Date): Promise<Job> {
  const jobId = seen.id;
  await lockStagesOf(trx, actor.shopId, jobId);
  await lockJob(trx, actor.shopId, jobId);
  const job = await findJob(trx, actor.shopId, jobId);
  if (!job) throw notFound();
  if (job.state !== 'withdrawn') {
    if (job.version !== seen.version)
      throw new Refusal('stale', { current: await jobInShop(trx, actor.shopId, jobId, now) });
    if (job.state === 'done') throw jobRefused('job-done', job);
    const stages = await stagesOfJob(trx, actor.shopId, jobId);
    const running = stages.find((stage) => stage.state === 'running');
    if (running) throw jobRefused('stage-running', job, running);
    await setJobState(trx, actor.shopId, { id: jobId, state: 'withdrawn', finishedAt: null });
    const bookings = await cancelBookingsOfJob(trx, actor.shopId, jobId);
    const draftId = await dropDraftItemsOfJob(trx, actor.shopId, jobId, now);
    if (draftId !== null) await recordChange(trx, actor, { kind: 'draft-changed', ids: [draftId] });
    await recordChange(trx, actor, { kind: 'job-withdrawn', ids: [jobId], detail: { bookings } });
  }
  return jobInShop(trx, actor.shopId, jobId, now);
}
