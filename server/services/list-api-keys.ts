import type { ApiKey } from '#contracts/api-keys.ts';
import * as db from '../db/api-keys.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';

export const listApiKeys = (deps: Deps, actor: Actor): Promise<{ keys: ApiKey[] }> =>
  inShop(deps.db, actor, async (trx) => ({ keys: (await db.listApiKeys(trx, actor.shopId)).map(keyView) }));

export const keyView = ({ createdAt, lastUsedAt, revokedAt, ...key }: db.ApiKeyRow): ApiKey => ({
  ...key,
  createdAt: createdAt.toISOString(),
  lastUsedAt: lastUsedAt?.toISOString() ?? null,
  revokedAt: revokedAt?.toISOString() ?? null,
});
