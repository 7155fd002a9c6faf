import { joinedTo, inShop } from '../db/in-shop.ts';
import { claimKey, forgetOldKeys, keepReply, type KeyedRequest } from '../db/idempotency.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';

const keptFor = 2 * 86_400_000;

/**
 * Does a keyed request once and gives its answer again when it comes again. The key, everything the services write and the
 * answer commit in one transaction: after a crash either all of it is there or nothing is, and the next try does it
 * anew. Two at the same time: the second waits for the first and gets its answer. A refusal keeps nothing, so the
 * same key may be tried again.
 * @throws {Refusal} key-reused where the key came with another request before
 */
export function once<T>(deps: Deps, actor: Actor, request: KeyedRequest, produce: () => Promise<T>): Promise<T> {
  return inShop(deps.db, actor, async (trx) => {
    const kept = await claimKey(trx, actor, request);
    if (kept) {
      if (kept.route !== request.route || !kept.hash.equals(request.hash)) throw new Refusal('key-reused');
      return kept.reply as T;
    }
    const reply = await joinedTo(trx, actor, produce);
    await keepReply(trx, actor, request.key, reply);
    await forgetOldKeys(trx, actor.shopId, new Date(deps.now().getTime() - keptFor));
    return reply;
  });
}
