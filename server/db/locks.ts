import type { Trx } from './in-shop.ts';

// One order for everybody, so that nobody waits for each other in a ring: stages, the draft, places, lamps and people,
// and the shop's row last, where every change is recorded.

/** Takes the stages that are still to be done, in id order: nobody starts or finishes one until the transaction ends. */
export async function lockOpenStages(trx: Trx, shopId: string): Promise<void> {
  await trx.raw(
    `select s.id from stage s join job j on j.shop_id = s.shop_id and j.id = s.job_id
     where s.shop_id = ? and s.state <> 'done' and j.state = 'open'
     order by s.id for no key update of s`,
    [shopId],
  );
}

/** Takes all places, lamps and people of the shop, each kind in id order: whoever books waits here, not in a deadlock. */
export async function lockResources(trx: Trx, shopId: string): Promise<void> {
  for (const table of ['place', 'lamp', 'person'] as const)
    await trx(table).where({ shop_id: shopId }).orderBy('id').forNoKeyUpdate().select('id');
}

/** Takes the shop's row until the transaction ends, so that only one at a time posts or records. */
export async function lockShop(trx: Trx, shopId: string): Promise<{ planNumber: number }> {
  const row = await trx('shop')
    .where({ id: shopId })
    .forNoKeyUpdate()
    .first<{ planNumber: number } | undefined>({ planNumber: 'plan_number' });
  if (!row) throw new Error(`Shop ${shopId} is not there, or this transaction has not entered it.`);
  return row;
}
