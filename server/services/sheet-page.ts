import type * as z from 'zod';
import type { sheetDetail } from '#contracts/sheets.ts';
import type { Trx } from '../db/in-shop.ts';
import { findSheetPage, type EditionRow } from '../db/sheet-pages.ts';
import { notFound } from '../errors.ts';

export type SheetPageReply = z.input<typeof sheetDetail>;

export const presentEdition = ({ at, ...edition }: EditionRow) => ({ ...edition, at: at.toISOString() });

/** The sheet's page, inside the caller's transaction. @throws {Refusal} not-found. */
export async function sheetInShop(trx: Trx, shopId: string, sheetId: string): Promise<SheetPageReply> {
  const page = await findSheetPage(trx, shopId, sheetId);
  if (!page) throw notFound();
  const { retiredAt, versions, ...sheet } = page;
  return { ...sheet, retiredAt: retiredAt?.toISOString() ?? null, versions: versions.map(presentEdition) };
}
