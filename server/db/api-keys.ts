import type { Trx } from './in-shop.ts';

export type ApiKeyRow = {
  id: string;
  label: string;
  hint: string;
  createdBy: string | null;
  createdAt: Date;
  lastUsedAt: Date | null;
  revokedAt: Date | null;
};

const keys = (trx: Trx, shopId: string) =>
  trx('api_key')
    .leftJoin('account', 'account.id', 'api_key.created_by')
    .where({ 'api_key.shop_id': shopId })
    .select<ApiKeyRow[]>({
      id: 'api_key.id',
      label: 'label',
      hint: 'hint',
      createdBy: 'account.name',
      createdAt: 'api_key.created_at',
      lastUsedAt: 'last_used_at',
      revokedAt: 'revoked_at',
    });

/** Those in use first, the newest before the older. */
export const listApiKeys = (trx: Trx, shopId: string): Promise<ApiKeyRow[]> =>
  keys(trx, shopId).orderByRaw('revoked_at is not null, api_key.created_at desc, api_key.id');

export const findApiKey = async (trx: Trx, shopId: string, id: string): Promise<ApiKeyRow | undefined> =>
  (await keys(trx, shopId).andWhere({ 'api_key.id': id }))[0];

/** False where the id is there already. */
export async function insertApiKey(
  trx: Trx,
  shopId: string,
  key: { id: string; label: string; hint: string; hash: Buffer; accountId: string; now: Date },
): Promise<boolean> {
  const made = await trx('api_key')
    .insert({
      shop_id: shopId,
      id: key.id,
      label: key.label,
      hint: key.hint,
      token_hash: key.hash,
      created_by: key.accountId,
      created_at: key.now,
    })
    .onConflict(['shop_id', 'id'])
    .ignore()
    .returning('id');
  return made.length === 1;
}

/** False where it was revoked before, or never was. */
export async function revokeApiKey(trx: Trx, shopId: string, id: string, now: Date): Promise<boolean> {
  const revoked = await trx('api_key').where({ shop_id: shopId, id, revoked_at: null }).update({ revoked_at: now });
  return revoked === 1;
}

const usedAnewAfter = 60_000;

/** The key of this hash if it is good. That it was used is written down at most once a minute. */
export async function useApiKey(trx: Trx, shopId: string, hash: Buffer, now: Date): Promise<string | undefined> {
  const key = await trx('api_key')
    .where({ shop_id: shopId, token_hash: hash, revoked_at: null })
    .first<{ id: string; lastUsedAt: Date | null } | undefined>({ id: 'id', lastUsedAt: 'last_used_at' });
  if (!key) return undefined;
  if (key.lastUsedAt === null || now.getTime() - key.lastUsedAt.getTime() >= usedAnewAfter)
    await trx('api_key').where({ shop_id: shopId, id: key.id }).update({ last_used_at: now });
  return key.id;
}
