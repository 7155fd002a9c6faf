import type { ChangeKind, Notice } from '#contracts/live.ts';
import type { Scope, Trx } from './in-shop.ts';

export const CHANGE_CHANNEL = 'ovenbird_change';

/**
 * Writes what was done into the shop's history and wakes live screens after commit. Takes the shop's row lock until
 * then, so numbers are without gaps and in order of commit: call it late in a transaction.
 */
export async function recordChange(
  trx: Trx,
  scope: Scope,
  change: { kind: ChangeKind; ids: string[]; detail?: Record<string, unknown> },
): Promise<number> {
  const [shop] = await trx('shop')
    .where({ id: scope.shopId })
    .increment('change_seq', 1)
    .returning<{ change_seq: number }[]>('change_seq');
  if (!shop) throw new Error(`no shop ${scope.shopId} to record a change in`);
  const seq = shop.change_seq;
  await trx('change').insert({
    shop_id: scope.shopId,
    seq,
    account_id: scope.accountId,
    kind: change.kind,
    ids: change.ids,
    detail: JSON.stringify(change.detail ?? {}),
  });
  await trx.raw(`select pg_notify(?, ?)`, [CHANGE_CHANNEL, JSON.stringify({ shopId: scope.shopId, seq })]);
  return seq;
}

/** Changes after `seq`, oldest first, at most `limit`. */
export async function changesSince(trx: Trx, shopId: string, seq: number, limit: number): Promise<Notice[]> {
  return trx('change')
    .where({ shop_id: shopId })
    .andWhere('seq', '>', seq)
    .orderBy('seq')
    .limit(limit)
    .select('seq', 'kind', 'ids');
}

/** The number of the shop's newest change; 0 where nothing has happened yet or the shop is not to be seen. */
export async function currentSeq(trx: Trx, shopId: string): Promise<number> {
  const shop = await trx('shop').where({ id: shopId }).first<{ seq: number } | undefined>({ seq: 'change_seq' });
  return shop?.seq ?? 0;
}
