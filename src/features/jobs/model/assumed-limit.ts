import type { Job } from '#contracts/jobs.ts';

/**
 * Held by the planner where nothing is recorded for a vehicle with a battery: 120 F, as several vehicle makers print
 * it, and 45 min in all. The same as in server/planning.
 */
export const assumedLimit = { celsius: ((120 - 32) * 5) / 9, minutes: 45 } as const;

/** The hottest that the vehicle of a job may get, as far as it is recorded or assumed; null: nothing limits it. */
export const heatLimitOf = (job: Pick<Job, 'electric' | 'heatLimitCelsius'>): number | null =>
  job.heatLimitCelsius ?? (job.electric ? assumedLimit.celsius : null);
