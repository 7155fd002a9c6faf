import type { Trx } from './in-shop.ts';

/**
 * Takes the shop's row until the transaction ends, so that only one at a time posts or records. Who also locks the draft
 * locks it first.
 */
export async function lockShop(trx: Trx, shopId: string): Promise<{ planNumber: number }> {
  const row = await trx('shop')
    .where({ id: shopId })
    .forNoKeyUpdate()
    .first<{ planNumber: number } | undefined>({ planNumber: 'plan_number' });
  if (!row) throw new Error(`Shop ${shopId} is not there, or this transaction has not entered it.`);
  return row;
}

/** Takes all places, lamps and people of the shop, each kind in id order: whoever books waits here, not in a deadlock. */
export async function lockResources(trx: Trx, shopId: string): Promise<void> {
  for (const table of ['place', 'lamp', 'person'] as const)
    await trx(table).where({ shop_id: shopId }).orderBy('id').forNoKeyUpdate().select('id');
}
