import type { Job } from '#contracts/jobs.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { findJob, jobHistory } from '../db/jobs.ts';
import { stagesOfJob } from '../db/stages.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { jobView } from './job-view.ts';

/** @throws {Refusal} not-found. */
export const readJob = (deps: Deps, actor: Actor, jobId: string): Promise<Job> =>
  inShop(deps.db, actor, (trx) => jobInShop(trx, actor.shopId, jobId, deps.now()));

/** The job's page, inside the caller's transaction. @throws {Refusal} not-found. */
export async function jobInShop(trx: Trx, shopId: string, jobId: string, now: Date): Promise<Job> {
  const job = await findJob(trx, shopId, jobId);
  if (!job) throw notFound();
  const stages = await stagesOfJob(trx, shopId, jobId);
  return jobView(job, stages, await jobHistory(trx, shopId, job), now);
}
