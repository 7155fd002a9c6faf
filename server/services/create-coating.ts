import { isDeepStrictEqual } from 'node:util';
import type { Coating, CoatingDetail } from '#contracts/coatings.ts';
import { recordChange } from '../db/changes.ts';
import { findCoating, insertCoating } from '../db/coatings.ts';
import { inShop } from '../db/in-shop.ts';
import { lockShop } from '../db/locks.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { checkCoating } from './check-coating.ts';
import { coatingInShop } from './coating-view.ts';

/**
 * Makes a data sheet. Sent twice with the same id it is made once.
 * @throws {Refusal} bad-request with fields; key-reused where the id belongs to another one
 */
export function createCoating(deps: Deps, actor: Actor, input: Coating): Promise<CoatingDetail> {
  return inShop(deps.db, actor, async (trx) => {
    const { shopId } = actor;
    await lockShop(trx, shopId);
    const there = await findCoating(trx, shopId, input.id);
    if (there) {
      const { id, name, kind, sheet } = there;
      if (!isDeepStrictEqual({ id, name, kind, sheet }, input)) throw new Refusal('key-reused');
      return coatingInShop(trx, shopId, id);
    }
    await checkCoating(trx, shopId, input);
    await insertCoating(trx, shopId, input);
    const { id, ...after } = input;
    await recordChange(trx, actor, { kind: 'sheets-changed', ids: [id], detail: { coating: 'made', after } });
    return coatingInShop(trx, shopId, id);
  });
}
