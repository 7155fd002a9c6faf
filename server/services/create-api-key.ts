import type { ApiKey } from '#contracts/api-keys.ts';
import { findApiKey, insertApiKey } from '../db/api-keys.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { keyView } from './list-api-keys.ts';
import { hashOf } from './one-time-token.ts';
import { makeKey } from './open-with-key.ts';

/** A key for a logger. @throws {Refusal} taken where the id was used: its secret was said then and is not kept. */
export function createApiKey(
  deps: Deps,
  actor: Actor,
  given: { id: string; label: string },
): Promise<{ key: ApiKey; secret: string }> {
  return inShop(deps.db, actor, async (trx) => {
    const secret = makeKey(actor.shopId);
    const made = await insertApiKey(trx, actor.shopId, {
      ...given,
      hint: secret.slice(-6),
      hash: hashOf(secret),
      accountId: actor.accountId,
      now: deps.now(),
    });
    if (!made) throw new Refusal('taken');
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [given.id], detail: { apiKey: given.label } });
    const key = await findApiKey(trx, actor.shopId, given.id);
    if (!key) throw new Error('The key that was just made is not there.');
    return { key: keyView(key), secret };
  });
}
