import { UNRECORDED_BATTERY_LIMIT } from '#chemistry/limits/heat-sources.ts';
import type { Job } from '#contracts/jobs.ts';

/** Held by the planner where nothing is recorded for a vehicle with a battery. */
export const assumedLimit = UNRECORDED_BATTERY_LIMIT;

/** The hottest that the vehicle of a job may get, as far as it is recorded or assumed; null: nothing limits it. */
export const heatLimitOf = (job: Pick<Job, 'electric' | 'heatLimitCelsius'>): number | null =>
  job.heatLimitCelsius ?? (job.electric ? assumedLimit.celsius : null);
