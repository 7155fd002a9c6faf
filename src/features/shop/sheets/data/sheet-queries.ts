import { queryOptions } from '@tanstack/react-query';
import { listCoatings } from '#contracts/coatings.ts';
import { readSheet, readSheetGround, readSheetVersion, surveySheets } from '#contracts/sheets.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';

export const surveyQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'sheets', 'survey'),
    queryFn: ({ signal }) => call(surveySheets, { params: { shopId }, signal }),
  });

export const sheetKey = (shopId: string, sheetId: string) => shopKey(shopId, 'sheets', 'one', sheetId);
export const sheetQuery = (shopId: string, sheetId: string) =>
  queryOptions({
    queryKey: sheetKey(shopId, sheetId),
    queryFn: ({ signal }) => call(readSheet, { params: { shopId, sheetId }, signal }),
  });

export const versionQuery = (shopId: string, sheetId: string, versionId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'sheets', 'version', versionId),
    queryFn: ({ signal }) => call(readSheetVersion, { params: { shopId, sheetId, versionId }, signal }),
    // A posted version never changes.
    staleTime: Infinity,
  });

export const coatingsQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'sheets', 'coatings'),
    queryFn: ({ signal }) => call(listCoatings, { params: { shopId }, signal }),
  });

/** Skills, lamps and places of the shop: asked for faults only, so it may be a little old. */
export const groundQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'setup', 'sheet-ground'),
    queryFn: ({ signal }) => call(readSheetGround, { params: { shopId }, signal }),
    staleTime: 60_000,
  });
