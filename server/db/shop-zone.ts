import type { Trx } from './in-shop.ts';

/** IANA name of the shop's time zone. */
export async function loadTimeZone(trx: Trx, shopId: string): Promise<string> {
  const row = await trx('shop').where({ id: shopId }).first<{ zone: string } | undefined>({ zone: 'time_zone' });
  if (!row) throw new Error(`Shop ${shopId} is not there, or this transaction has not entered it.`);
  return row.zone;
}
