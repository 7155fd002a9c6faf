import type * as z from 'zod';
import type { changeJob as contract, Job } from '#contracts/jobs.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { findJob, lockJob, updateJob, type JobFacts, type JobFields } from '../db/jobs.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { promiseFault } from './create-job.ts';
import { jobInShop } from './read-job.ts';
import { jobRefused } from './refuse-job.ts';

export type JobChange = z.output<typeof contract.body>;

/**
 * Changes the fields that are given. What says the same as before changes nothing, so a repeated request is harmless.
 * @throws {Refusal} not-found, stale with the job as it is now, bad-request with fields, refused where it is withdrawn.
 */
export function changeJob(deps: Deps, actor: Actor, jobId: string, input: JobChange): Promise<Job> {
  const { version, ...given } = input;
  return inShop(deps.db, actor, async (trx) => {
    await lockJob(trx, actor.shopId, jobId);
    const job = await findJob(trx, actor.shopId, jobId);
    if (!job) throw notFound();
    const fields = differing(job, given);
    if (Object.keys(fields).length > 0) {
      if (job.version !== version)
        throw new Refusal('stale', { current: await jobInShop(trx, actor.shopId, jobId, deps.now()) });
      if (job.state === 'withdrawn') throw jobRefused('job-withdrawn', job);
      refuseEarlyPromise({ ...job, ...fields });
      await updateJob(trx, actor.shopId, { id: jobId, version }, fields);
      await recordChange(trx, actor, { kind: 'job-changed', ids: [jobId], detail: beforeAndAfter(job, fields) });
    }
    return jobInShop(trx, actor.shopId, jobId, deps.now());
  });
}

/** Only what is given and not as it was, instants as dates. */
function differing(job: JobFacts, given: Omit<JobChange, 'version'>): Partial<JobFields> {
  const { releaseAt, promiseAt, ...rest } = given;
  const wanted: { [K in keyof JobFields]?: JobFields[K] | undefined } = {
    ...rest,
    ...(releaseAt === undefined ? {} : { releaseAt: new Date(releaseAt) }),
    ...(promiseAt === undefined ? {} : { promiseAt: promiseAt === null ? null : new Date(promiseAt) }),
  };
  const same = (a: unknown, b: unknown): boolean =>
    a instanceof Date && b instanceof Date ? a.getTime() === b.getTime() : a === b;
  const changed = Object.entries(wanted).filter(
    ([field, value]) => value !== undefined && !same(value, job[field as keyof JobFields]),
  );
  return Object.fromEntries(changed);
}

function refuseEarlyPromise(job: Pick<JobFields, 'releaseAt' | 'promiseAt'>): void {
  const fields = promiseFault(job.releaseAt.toISOString(), job.promiseAt?.toISOString() ?? null);
  if (fields.length > 0) throw new Refusal('bad-request', { fields });
}

const beforeAndAfter = (job: JobFacts, fields: Partial<JobFields>) => ({
  before: Object.fromEntries(Object.keys(fields).map((field) => [field, job[field as keyof JobFields]])),
  after: fields,
});
