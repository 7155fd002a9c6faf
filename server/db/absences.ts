import type { Trx } from './in-shop.ts';

export type NewAbsence = { id: string; from: Date; to: Date | null; reason: string };

export async function insertAbsence(trx: Trx, shopId: string, personId: string, given: NewAbsence): Promise<void> {
  await trx('absence').insert({
    shop_id: shopId,
    id: given.id,
    person_id: personId,
    during: trx.raw(`tstzrange(?, ?, '[)')`, [given.from, given.to]),
    reason: given.reason,
  });
}

/** False where there is no such absence of this person. */
export async function deleteAbsence(trx: Trx, shopId: string, personId: string, id: string): Promise<boolean> {
  return (await trx('absence').where({ shop_id: shopId, person_id: personId, id }).delete()) === 1;
}

/** Takes back the absence without end that began when somebody left. */
export async function deleteLeaving(trx: Trx, shopId: string, personId: string, from: Date): Promise<void> {
  await trx('absence')
    .where({ shop_id: shopId, person_id: personId })
    .andWhereRaw('lower(during) = ? and upper_inf(during)', [from])
    .delete();
}
