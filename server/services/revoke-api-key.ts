import type { ApiKey } from '#contracts/api-keys.ts';
import { findApiKey, revokeApiKey as revoke } from '../db/api-keys.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { keyView } from './list-api-keys.ts';

/** Ends a key for good; once more changes nothing. @throws {Refusal} not-found */
export function revokeApiKey(deps: Deps, actor: Actor, id: string): Promise<ApiKey> {
  return inShop(deps.db, actor, async (trx) => {
    const revoked = await revoke(trx, actor.shopId, id, deps.now());
    const key = await findApiKey(trx, actor.shopId, id);
    if (!key) throw notFound();
    if (revoked)
      await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: { apiKeyRevoked: key.label } });
    return keyView(key);
  });
}
