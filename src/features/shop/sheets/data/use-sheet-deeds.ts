import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { BodyOf } from '#contracts/endpoint.ts';
import {
  changeSheet,
  createSheet,
  exportSheet,
  exportSheets,
  importSheet,
  saveSheet,
  sheetDetail,
  type SheetDetail,
} from '#contracts/sheets.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { saveCsv } from '../../parts/save-csv.ts';
import { sheetKey } from './sheet-queries.ts';

/** Puts the sheet as the server has it where its page looks, and lets the lists ask again. */
function useTakeIn(shopId: string) {
  const client = useQueryClient();
  return (taken: SheetDetail) => {
    client.setQueryData(sheetKey(shopId, taken.id), taken);
    void client.invalidateQueries({ queryKey: shopKey(shopId, 'sheets', 'survey') });
    void client.invalidateQueries({ queryKey: shopKey(shopId, 'sheets'), exact: true });
  };
}

export function useCreateSheet(shopId: string) {
  const onSuccess = useTakeIn(shopId);
  return useMutation({
    mutationFn: (body: BodyOf<typeof createSheet>) => call(createSheet, { params: { shopId }, body }),
    onSuccess,
  });
}

export function useImportSheet(shopId: string) {
  const onSuccess = useTakeIn(shopId);
  return useMutation({
    mutationFn: (body: BodyOf<typeof importSheet>) => call(importSheet, { params: { shopId }, body }),
    onSuccess,
  });
}

export function useSaveSheet(shopId: string, sheetId: string) {
  const onSuccess = useTakeIn(shopId);
  return useMutation({
    mutationFn: (body: BodyOf<typeof saveSheet>) => call(saveSheet, { params: { shopId, sheetId }, body }),
    onSuccess,
    onError: (error) => {
      const current = currentSheetOf(error);
      if (current) onSuccess(current);
    },
  });
}

export function useChangeSheet(shopId: string) {
  const takeIn = useTakeIn(shopId);
  return useMutation({
    mutationFn: ({ sheetId, ...body }: BodyOf<typeof changeSheet> & { sheetId: string }) =>
      call(changeSheet, { params: { shopId, sheetId }, body }),
    onSuccess: takeIn,
    onError: (error) => {
      const current = currentSheetOf(error);
      if (current) takeIn(current);
    },
  });
}

/** The sheet as it stands, from an answer that says it has changed since; null for any other failure. */
export function currentSheetOf(error: unknown): SheetDetail | null {
  if (!isApiError(error, 'stale')) return null;
  const parsed = sheetDetail.safeParse(error.current);
  return parsed.success ? parsed.data : null;
}

/** One sheet as a file that another shop can take. */
export const useExportSheet = (shopId: string) =>
  useMutation({
    mutationFn: (sheetId: string) => call(exportSheet, { params: { shopId, sheetId } }),
    onSuccess: ({ fileName, file }) => saveJson(fileName, file),
  });

/** All sheets in use as a table. */
export const useExportSheets = (shopId: string) =>
  useMutation({ mutationFn: () => call(exportSheets, { params: { shopId } }), onSuccess: saveCsv });

function saveJson(fileName: string, value: unknown): void {
  const address = URL.createObjectURL(new Blob([`${JSON.stringify(value, null, 2)}\n`], { type: 'application/json' }));
  const link = document.createElement('a');
  link.href = address;
  link.download = fileName;
  link.click();
  setTimeout(() => URL.revokeObjectURL(address), 10_000);
}
