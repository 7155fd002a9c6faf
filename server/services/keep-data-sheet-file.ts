import type { CoatingDetail } from '#contracts/coatings.ts';
import { removeAttachments } from '../db/attachments.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { lockShop } from '../db/locks.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';
import { coatingInShop, keptCoating } from './coating-view.ts';
import { keepFile, putFile, type ReceivedFile } from './keep-file.ts';

/**
 * Attaches the maker's sheet to a data sheet, instead of the one that was there.
 * @throws {Refusal} not-found; too-large where the shop's room is used up
 */
export async function keepDataSheetFile(
  deps: Deps,
  actor: Actor,
  coatingId: string,
  file: ReceivedFile,
): Promise<CoatingDetail> {
  const { shopId } = actor;
  await inShop(deps.db, actor, (trx) => keptCoating(trx, shopId, coatingId));
  await putFile(deps, actor, file);
  return inShop(deps.db, actor, async (trx) => {
    await lockShop(trx, shopId);
    await keptCoating(trx, shopId, coatingId);
    await keepFile(trx, deps, actor, file, { kind: 'data-sheet', subjectId: coatingId, instead: true });
    const detail = { coating: 'file-attached', file: file.name };
    await recordChange(trx, actor, { kind: 'sheets-changed', ids: [coatingId], detail });
    return coatingInShop(trx, shopId, coatingId);
  });
}

/** Takes it off; where there is none nothing happens. The bytes go a month later. @throws {Refusal} not-found */
export function removeDataSheetFile(deps: Deps, actor: Actor, coatingId: string): Promise<CoatingDetail> {
  return inShop(deps.db, actor, async (trx) => {
    const { shopId } = actor;
    await lockShop(trx, shopId);
    await keptCoating(trx, shopId, coatingId);
    const removed = await removeAttachments(trx, shopId, { kind: 'data-sheet', subjectId: coatingId }, deps.now());
    if (removed > 0)
      await recordChange(trx, actor, {
        kind: 'sheets-changed',
        ids: [coatingId],
        detail: { coating: 'file-removed' },
      });
    return coatingInShop(trx, shopId, coatingId);
  });
}
