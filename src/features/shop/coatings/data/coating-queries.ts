import { queryOptions } from '@tanstack/react-query';
import { readCoating, surveyCoatings } from '#contracts/coatings.ts';
import { readTouched } from '#contracts/retiming.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';

export const surveyQuery = (shopId: string, retired: 'no' | 'yes') =>
  queryOptions({
    queryKey: shopKey(shopId, 'sheets', 'coating-survey', retired),
    queryFn: ({ signal }) => call(surveyCoatings, { params: { shopId }, query: { retired }, signal }),
    staleTime: 60_000,
  });

export const coatingQuery = (shopId: string, coatingId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'sheets', 'coating', coatingId),
    queryFn: ({ signal }) => call(readCoating, { params: { shopId, coatingId }, signal }),
    staleTime: 60_000,
  });

/** `version`: of the data sheet, so that a change of it asks anew. */
export const touchedQuery = (shopId: string, coatingId: string, version: number) =>
  queryOptions({
    queryKey: shopKey(shopId, 'sheets', 'touched', coatingId, version),
    queryFn: ({ signal }) => call(readTouched, { params: { shopId, coatingId }, signal }),
    staleTime: 30_000,
  });
