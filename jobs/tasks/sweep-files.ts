import { wantedAttachments } from '#server/db/attachments.ts';
import { inShop } from '#server/db/in-shop.ts';
import type { Deps } from '#server/deps.ts';
import { keyOf, partsOfKey } from '#server/storage/storage.ts';
import type { TaskFunction } from '../task-function.ts';

const day = 86_400_000;
const atOnce = 200;

/**
 * Deletes bytes that nobody can reach any more: without a row and older than a day, so that no upload under way loses
 * its own, or taken off a month ago. Keys of another shape are none of ours and stay.
 */
export const sweepFiles: TaskFunction = async (deps, _task, signal) => {
  const before = deps.now().getTime() - day;
  const byShop = new Map<string, string[]>();
  let swept = 0;
  const sweep = async (shopId: string, ids: string[]) => {
    byShop.delete(shopId);
    swept += await sweepSome(deps, shopId, ids);
  };
  for await (const { key, changedAt } of deps.storage.list()) {
    if (signal.aborted) return;
    const parts = changedAt.getTime() < before ? partsOfKey(key) : null;
    if (!parts) continue;
    const ids = [...(byShop.get(parts.shopId) ?? []), parts.id];
    if (ids.length >= atOnce) await sweep(parts.shopId, ids);
    else byShop.set(parts.shopId, ids);
  }
  for (const [shopId, ids] of [...byShop]) await sweep(shopId, ids);
  deps.log.info({ swept }, 'files without a row swept');
};

async function sweepSome(deps: Deps, shopId: string, ids: string[]): Promise<number> {
  const since = new Date(deps.now().getTime() - 30 * day);
  const wanted = await inShop(deps.db, { shopId, accountId: null }, (trx) =>
    wantedAttachments(trx, shopId, ids, since),
  );
  const gone = ids.filter((id) => !wanted.has(id));
  for (const id of gone) await deps.storage.delete(keyOf(shopId, id));
  return gone.length;
}
