import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { listJobs, readJob } from '#contracts/jobs.ts';
import { listSheets } from '#contracts/sheets.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import type { ListLink } from '../model/list-link.ts';

export const jobsQuery = (shopId: string, link: ListLink) =>
  queryOptions({
    queryKey: shopKey(shopId, 'jobs', link),
    queryFn: ({ signal }) => call(listJobs, { params: { shopId }, query: link, signal }),
    // The rows stay in place while the next ones are fetched: nothing jumps while one types.
    placeholderData: keepPreviousData,
  });

export const jobKey = (shopId: string, jobId: string) => shopKey(shopId, 'job', jobId);
export const jobQuery = (shopId: string, jobId: string) =>
  queryOptions({
    queryKey: jobKey(shopId, jobId),
    queryFn: ({ signal }) => call(readJob, { params: { shopId, jobId }, signal }),
  });

export const sheetsQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'sheets'),
    queryFn: ({ signal }) => call(listSheets, { params: { shopId }, signal }),
    staleTime: 5 * 60_000,
  });
