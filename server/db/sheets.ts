import type { Sheet, SheetBody } from '#contracts/sheets.ts';
import type { Trx } from './in-shop.ts';

const newest = (trx: Trx, shopId: string) =>
  trx('process_sheet')
    .join('process_sheet_version as edition', (on) =>
      on
        .on('edition.shop_id', 'process_sheet.shop_id')
        .andOn('edition.process_sheet_id', 'process_sheet.id')
        .andOn('edition.version', 'process_sheet.version'),
    )
    .where({ 'process_sheet.shop_id': shopId });

const columns = {
  id: 'process_sheet.id',
  name: 'process_sheet.name',
  version: 'process_sheet.version',
  versionId: 'edition.id',
  body: 'edition.body',
};

/** The shop's process sheets in their newest version, by name. */
export const listSheets = (trx: Trx, shopId: string): Promise<Sheet[]> =>
  newest(trx, shopId).whereNull('process_sheet.retired_at').orderBy('process_sheet.name').select<Sheet[]>(columns);

/** The newest version of one sheet; undefined where it is unknown or retired. */
export const findSheet = (trx: Trx, shopId: string, sheetId: string): Promise<Sheet | undefined> =>
  newest(trx, shopId)
    .whereNull('process_sheet.retired_at')
    .where({ 'process_sheet.id': sheetId })
    .first<Sheet | undefined>(columns);

/** A sheet as it is kept: retired or not. */
export type KeptSheet = Sheet & { revision: number; retiredAt: Date | null };

/** The newest version of one sheet, retired or not, with its row taken until the transaction ends. */
export const takeSheet = (trx: Trx, shopId: string, sheetId: string): Promise<KeptSheet | undefined> =>
  newest(trx, shopId)
    .where({ 'process_sheet.id': sheetId })
    .forNoKeyUpdate('process_sheet')
    .first<KeptSheet | undefined>({
      ...columns,
      revision: 'process_sheet.revision',
      retiredAt: 'process_sheet.retired_at',
    });

export const sheetIdNamed = async (trx: Trx, shopId: string, name: string): Promise<string | undefined> => {
  const row = await trx('process_sheet').where({ shop_id: shopId, name }).first<{ id: string } | undefined>('id');
  return row?.id;
};

type Written = { note?: string; by?: string | null; at?: Date };

export async function insertSheet(
  trx: Trx,
  shopId: string,
  sheet: { id: string; versionId: string; name: string; body: SheetBody } & Written,
): Promise<void> {
  await trx('process_sheet').insert({ shop_id: shopId, id: sheet.id, name: sheet.name });
  await insertVersion(trx, shopId, { ...sheet, sheetId: sheet.id, version: 1 });
}

export async function insertVersion(
  trx: Trx,
  shopId: string,
  edition: { sheetId: string; versionId: string; version: number; body: SheetBody } & Written,
): Promise<void> {
  const { sheetId, versionId, version, body, note = '', by = null, at } = edition;
  await trx('process_sheet_version').insert({
    shop_id: shopId,
    id: versionId,
    process_sheet_id: sheetId,
    version,
    body: JSON.stringify(body),
    note,
    created_by: by,
    ...(at ? { created_at: at } : {}),
  });
}

/** Writes what is given and counts the change. */
export async function updateSheet(
  trx: Trx,
  shopId: string,
  sheetId: string,
  fields: { name?: string | undefined; version?: number; retiredAt?: Date | null },
): Promise<void> {
  const { name, version, retiredAt } = fields;
  await trx('process_sheet')
    .where({ shop_id: shopId, id: sheetId })
    .update({
      ...(name === undefined ? {} : { name }),
      ...(version === undefined ? {} : { version }),
      ...(retiredAt === undefined ? {} : { retired_at: retiredAt }),
    })
    .increment('revision', 1);
}
