import type { Job } from '#contracts/jobs.ts';
import { cancelBookingsOfJob, dropDraftItemsOfJob } from '../db/bookings-of-job.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { findJob, lockJob, setJobState } from '../db/jobs.ts';
import { stagesOfJob } from '../db/stages.ts';
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
  return inShop(deps.db, actor, async (trx) => {
    await lockJob(trx, actor.shopId, jobId);
    const job = await findJob(trx, actor.shopId, jobId);
    if (!job) throw notFound();
    if (job.state !== 'withdrawn') {
      if (job.version !== version)
        throw new Refusal('stale', { current: await jobInShop(trx, actor.shopId, jobId, deps.now()) });
      if (job.state === 'done') throw jobRefused('job-done', job);
      const stages = await stagesOfJob(trx, actor.shopId, jobId);
      const running = stages.find((stage) => stage.state === 'running');
      if (running) throw jobRefused('stage-running', job, running);
      await setJobState(trx, actor.shopId, { id: jobId, state: 'withdrawn', finishedAt: null });
      const bookings = await cancelBookingsOfJob(trx, actor.shopId, jobId);
      const draftId = await dropDraftItemsOfJob(trx, actor.shopId, jobId, deps.now());
      if (draftId !== null) await recordChange(trx, actor, { kind: 'draft-changed', ids: [draftId] });
      await recordChange(trx, actor, { kind: 'job-withdrawn', ids: [jobId], detail: { bookings } });
    }
    return jobInShop(trx, actor.shopId, jobId, deps.now());
  });
}
