import type * as z from 'zod';
import type { changeSheet as contract } from '#contracts/sheets.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { lockShop } from '../db/locks.ts';
import { takeSheet, updateSheet } from '../db/sheets.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { mustBeFree } from './check-sheet.ts';
import { sheetInShop, type SheetPageReply } from './sheet-page.ts';

/**
 * Renames a sheet, retires it or brings it back. Jobs made from it go on; no new ones are made from a retired one.
 * @throws {Refusal} not-found; stale with the current sheet; bad-request (name taken)
 */
export function changeSheet(
  deps: Deps,
  actor: Actor,
  sheetId: string,
  { revision, name, retired }: z.output<typeof contract.body>,
): Promise<SheetPageReply> {
  return inShop(deps.db, actor, async (trx) => {
    const { shopId } = actor;
    await lockShop(trx, shopId);
    const sheet = await takeSheet(trx, shopId, sheetId);
    if (!sheet) throw notFound();
    const wanted = { name: name ?? sheet.name, retired: retired ?? sheet.retiredAt !== null };
    const before = { name: sheet.name, retired: sheet.retiredAt !== null };
    if (wanted.name === before.name && wanted.retired === before.retired) return sheetInShop(trx, shopId, sheetId);
    if (revision !== sheet.revision) throw new Refusal('stale', { current: await sheetInShop(trx, shopId, sheetId) });
    await mustBeFree(trx, shopId, wanted.name, sheetId);
    const retiredAt = wanted.retired ? (sheet.retiredAt ?? deps.now()) : null;
    await updateSheet(trx, shopId, sheetId, { name: wanted.name, retiredAt });
    await recordChange(trx, actor, { kind: 'sheets-changed', ids: [sheetId], detail: { before, after: wanted } });
    return sheetInShop(trx, shopId, sheetId);
  });
}
