import type { Scope, Trx } from './in-shop.ts';

export type KeyedRequest = { key: string; route: string; hash: Buffer };
type Kept = { route: string; hash: Buffer; reply: unknown };

/**
 * Takes the key for this transaction. Where another one holds it, waits until that one ends, and answers with what it
 * kept; undefined where the key is ours.
 */
export async function claimKey(trx: Trx, scope: Scope, request: KeyedRequest): Promise<Kept | undefined> {
  const row = { shop_id: scope.shopId, account_id: scope.accountId, key: request.key };
  const claimed = await trx('idempotency')
    .insert({ ...row, route: request.route, request_hash: request.hash, status: 200 })
    .onConflict(['shop_id', 'account_id', 'key'])
    .ignore()
    .returning('key');
  if (claimed.length > 0) return undefined;
  return trx('idempotency').where(row).first<Kept>({ route: 'route', hash: 'request_hash', reply: 'reply' });
}

export async function keepReply(trx: Trx, scope: Scope, key: string, reply: unknown): Promise<void> {
  await trx('idempotency')
    .where({ shop_id: scope.shopId, account_id: scope.accountId, key })
    .update({ reply: JSON.stringify(reply) });
}

/** Forgets a few of the shop's old keys; leaves to others what others are at. */
export async function forgetOldKeys(trx: Trx, shopId: string, before: Date): Promise<void> {
  await trx.raw(
    `delete from idempotency where shop_id = :shopId and (account_id, key) in (
       select account_id, key from idempotency where shop_id = :shopId and created_at < :before
       limit 100 for update skip locked)`,
    { shopId, before },
  );
}
