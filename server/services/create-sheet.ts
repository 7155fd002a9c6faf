import { isDeepStrictEqual } from 'node:util';
import { v7 as uuid } from 'uuid';
import type * as z from 'zod';
import type { createSheet as contract, SheetBody } from '#contracts/sheets.ts';
import { recordChange } from '../db/changes.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { lockShop } from '../db/locks.ts';
import { findEdition } from '../db/sheet-pages.ts';
import { insertSheet, takeSheet } from '../db/sheets.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { checkSheet, mustBeFree } from './check-sheet.ts';
import { sheetInShop, type SheetPageReply } from './sheet-page.ts';

/**
 * Makes a process sheet, of a body or as a copy of another. Sent twice with the same id it is made once.
 * @throws {Refusal} bad-request (name taken, nothing to copy), refused with the sheet's faults, key-reused
 */
export function createSheet(
  deps: Deps,
  actor: Actor,
  { id, name, body, copyOf, note }: z.output<typeof contract.body>,
): Promise<SheetPageReply> {
  return inShop(deps.db, actor, async (trx) => {
    const first = body ?? (await bodyToCopy(trx, actor.shopId, copyOf ?? ''));
    return addSheet(deps, trx, actor, { id, name, body: first, note });
  });
}

type NewSheet = { id: string; name: string; body: SheetBody; note: string };

/** The same inside the caller's transaction. */
export async function addSheet(deps: Deps, trx: Trx, actor: Actor, sheet: NewSheet): Promise<SheetPageReply> {
  // Two who send the same sheet, or two sheets of one name, are served one after the other.
  await lockShop(trx, actor.shopId);
  if (await wasMade(trx, actor.shopId, sheet)) return sheetInShop(trx, actor.shopId, sheet.id);
  await mustBeFree(trx, actor.shopId, sheet.name, sheet.id);
  await checkSheet(trx, actor.shopId, sheet.body, deps.now());
  await insertSheet(trx, actor.shopId, { ...sheet, versionId: uuid(), by: actor.accountId, at: deps.now() });
  await recordChange(trx, actor, { kind: 'sheets-changed', ids: [sheet.id], detail: { name: sheet.name, version: 1 } });
  return sheetInShop(trx, actor.shopId, sheet.id);
}

async function wasMade(trx: Trx, shopId: string, sheet: NewSheet): Promise<boolean> {
  const made = await findEdition(trx, shopId, { 'e.process_sheet_id': sheet.id, 'e.version': 1 });
  if (!made) return false;
  if (!isDeepStrictEqual(made.body, JSON.parse(JSON.stringify(sheet.body)))) throw new Refusal('key-reused');
  return true;
}

async function bodyToCopy(trx: Trx, shopId: string, sheetId: string): Promise<SheetBody> {
  const original = await takeSheet(trx, shopId, sheetId);
  if (original) return original.body;
  throw new Refusal('bad-request', { fields: [{ path: 'body.copyOf', message: 'no such process sheet' }] });
}
