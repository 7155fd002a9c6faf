import { isDeepStrictEqual } from 'node:util';
import { v7 as uuid } from 'uuid';
import type * as z from 'zod';
import type { saveSheet as contract } from '#contracts/sheets.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { lockShop } from '../db/locks.ts';
import { insertVersion, takeSheet, updateSheet } from '../db/sheets.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { checkSheet, mustBeFree } from './check-sheet.ts';
import { sheetInShop, type SheetPageReply } from './sheet-page.ts';

/**
 * Posts a changed sheet as its next version; jobs keep the version they were made with. The same body as before makes no
 * version, so that saving twice is safe.
 * @throws {Refusal} not-found; stale with the current sheet; bad-request (name taken); refused with the sheet's faults
 */
export function saveSheet(
  deps: Deps,
  actor: Actor,
  sheetId: string,
  given: z.output<typeof contract.body>,
): Promise<SheetPageReply> {
  return inShop(deps.db, actor, async (trx) => {
    const { shopId } = actor;
    await lockShop(trx, shopId);
    const sheet = await takeSheet(trx, shopId, sheetId);
    if (!sheet) throw notFound();
    const name = given.name ?? sheet.name;
    const sameBody = isDeepStrictEqual(sheet.body, JSON.parse(JSON.stringify(given.body)));
    if (sameBody && name === sheet.name) return sheetInShop(trx, shopId, sheetId);
    if (given.version !== sheet.version)
      throw new Refusal('stale', { current: await sheetInShop(trx, shopId, sheetId) });
    await mustBeFree(trx, shopId, name, sheetId);
    const version = sheet.version + (sameBody ? 0 : 1);
    if (!sameBody) {
      await checkSheet(trx, shopId, given.body, deps.now());
      const { body, note } = given;
      await insertVersion(trx, shopId, {
        sheetId,
        versionId: uuid(),
        version,
        body,
        note,
        by: actor.accountId,
        at: deps.now(),
      });
    }
    await updateSheet(trx, shopId, sheetId, { name, version });
    const detail = { name, version, note: given.note };
    await recordChange(trx, actor, { kind: 'sheets-changed', ids: [sheetId], detail });
    return sheetInShop(trx, shopId, sheetId);
  });
}
