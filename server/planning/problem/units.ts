import type { OpenJob } from '#server/db/open-jobs.ts';

/** Room that a job's parts take together; at least 1. */
export const unitsOf = (job: OpenJob): number =>
  Math.max(
    1,
    job.parts.reduce((sum, part) => sum + part.units, 0),
  );
