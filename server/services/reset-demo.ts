import { v7 as uuid } from 'uuid';
import { resetWords } from '#contracts/shops.ts';
import { inShop } from '../db/in-shop.ts';
import { lockShop } from '../db/locks.ts';
import { enqueue } from '../db/tasks.ts';
import { isBeingReset, isDemo } from '../db/wipe-shop.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';

/**
 * Asks for the demo shop to be put back as on its first day; the worker does it. Asked again before it is done it is
 * done once.
 * @throws {Refusal} bad-request where the words are not those to be typed; not-found where the shop is no demo
 */
export function resetDemo(deps: Deps, actor: Actor, words: string): Promise<void> {
  if (words.trim().toLowerCase() !== resetWords)
    throw new Refusal('bad-request', { fields: [{ path: 'body.words', message: `must be: ${resetWords}` }] });
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    if (!(await isDemo(trx, shopId))) throw notFound();
    // Before the lock as well: who puts it back holds that until it is done.
    if (await isBeingReset(trx, shopId)) return;
    await lockShop(trx, shopId);
    if (await isBeingReset(trx, shopId)) return;
    await enqueue(trx, { kind: 'reset-demo', key: uuid(), shopId, payload: {} });
  });
}
