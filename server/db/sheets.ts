import type { Sheet, SheetBody } from '#contracts/sheets.ts';
import type { Trx } from './in-shop.ts';

const current = (trx: Trx, shopId: string) =>
  trx('process_sheet')
    .join('process_sheet_version as edition', (on) =>
      on
        .on('edition.shop_id', 'process_sheet.shop_id')
        .andOn('edition.process_sheet_id', 'process_sheet.id')
        .andOn('edition.version', 'process_sheet.version'),
    )
    .where({ 'process_sheet.shop_id': shopId })
    .whereNull('process_sheet.retired_at');

const columns = {
  id: 'process_sheet.id',
  name: 'process_sheet.name',
  version: 'process_sheet.version',
  versionId: 'edition.id',
  body: 'edition.body',
};

/** The shop's process sheets in their newest version, by name. */
export const listSheets = (trx: Trx, shopId: string): Promise<Sheet[]> =>
  current(trx, shopId).orderBy('process_sheet.name').select<Sheet[]>(columns);

/** The newest version of one sheet; undefined where it is unknown or retired. */
export const findSheet = (trx: Trx, shopId: string, sheetId: string): Promise<Sheet | undefined> =>
  current(trx, shopId).where({ 'process_sheet.id': sheetId }).first<Sheet | undefined>(columns);

export async function insertSheet(
  trx: Trx,
  shopId: string,
  sheet: { id: string; versionId: string; name: string; body: SheetBody },
): Promise<void> {
  await trx('process_sheet').insert({ shop_id: shopId, id: sheet.id, name: sheet.name });
  await trx('process_sheet_version').insert({
    shop_id: shopId,
    id: sheet.versionId,
    process_sheet_id: sheet.id,
    version: 1,
    body: JSON.stringify(sheet.body),
  });
}
