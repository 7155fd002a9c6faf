import type { ReplyOf } from '#contracts/endpoint.ts';
import type { readSheetVersion, surveySheets as survey } from '#contracts/sheets.ts';
import { inShop } from '../db/in-shop.ts';
import * as pages from '../db/sheet-pages.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { sheetInShop, type SheetPageReply } from './sheet-page.ts';

export const surveySheets = (deps: Deps, actor: Actor): Promise<ReplyOf<typeof survey>> =>
  inShop(deps.db, actor, async (trx) => ({
    sheets: (await pages.surveySheets(trx, actor.shopId)).map(({ retiredAt, savedAt, ...sheet }) => ({
      ...sheet,
      retiredAt: retiredAt?.toISOString() ?? null,
      savedAt: savedAt.toISOString(),
    })),
  }));

/** @throws {Refusal} not-found */
export const readSheet = (deps: Deps, actor: Actor, sheetId: string): Promise<SheetPageReply> =>
  inShop(deps.db, actor, (trx) => sheetInShop(trx, actor.shopId, sheetId));

/** @throws {Refusal} not-found: no such sheet in this shop, or no such version of it */
export const readVersion = (
  deps: Deps,
  actor: Actor,
  sheetId: string,
  versionId: string,
): Promise<ReplyOf<typeof readSheetVersion>> =>
  inShop(deps.db, actor, async (trx) => {
    const edition = await pages.findEdition(trx, actor.shopId, { 'e.process_sheet_id': sheetId, 'e.id': versionId });
    if (!edition) throw notFound();
    return { ...edition, at: edition.at.toISOString() };
  });
