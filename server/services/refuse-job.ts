import { Refusal } from '../errors.ts';

type JobRefusal = 'job-withdrawn' | 'job-done' | 'stage-running';

/** A refusal about a job as a whole; `stage` where one of its stages is what stands in the way. */
export const jobRefused = (
  code: JobRefusal,
  job: { id: string; title: string },
  stage?: { id: string; title: string },
): Refusal =>
  new Refusal('refused', {
    reasons: [{ code, rule: null, stageId: stage?.id ?? null, ids: [job.id], names: [job.title], at: [], minutes: [] }],
  });
