import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { BodyOf } from '#contracts/endpoint.ts';
import { changeJob, createJob, job, withdrawJob, type Job, type NewJob } from '#contracts/jobs.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { jobKey } from './jobs-queries.ts';

/** Puts the job as the server has it where the page looks, and lets the lists ask again. */
function useTakeIn(shopId: string) {
  const client = useQueryClient();
  return (taken: Job) => {
    client.setQueryData(jobKey(shopId, taken.id), taken);
    void client.invalidateQueries({ queryKey: shopKey(shopId, 'jobs') });
  };
}

export function useCreateJob(shopId: string) {
  const takeIn = useTakeIn(shopId);
  return useMutation({
    mutationFn: (body: NewJob) => call(createJob, { params: { shopId }, body }),
    onSuccess: takeIn,
  });
}

export type JobChange = Omit<BodyOf<typeof changeJob>, 'version'>;

export function useChangeJob(shopId: string, jobId: string) {
  const takeIn = useTakeIn(shopId);
  return useMutation({
    mutationFn: (body: JobChange & { version: number }) => call(changeJob, { params: { shopId, jobId }, body }),
    onSuccess: takeIn,
    onError: (error) => takeInCurrent(error, takeIn),
  });
}

export function useWithdrawJob(shopId: string, jobId: string) {
  const takeIn = useTakeIn(shopId);
  return useMutation({
    mutationFn: (version: number) => call(withdrawJob, { params: { shopId, jobId }, body: { version } }),
    onSuccess: takeIn,
    onError: (error) => takeInCurrent(error, takeIn),
  });
}

/** The job as it stands, from an answer that says it has changed since; null for any other failure. */
export function currentOf(error: unknown): Job | null {
  if (!isApiError(error, 'stale')) return null;
  const parsed = job.safeParse(error.current);
  return parsed.success ? parsed.data : null;
}

function takeInCurrent(error: unknown, takeIn: (job: Job) => void): void {
  const current = currentOf(error);
  if (current) takeIn(current);
}
