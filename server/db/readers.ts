import type { Trx } from './in-shop.ts';

/** Who reads a letter of a shop, and how it wants to be told times. */
export type Reader = { name: string; clock: '24' | '12'; isMember: boolean };
export type LetterShop = { name: string; timeZone: string };

export async function findReader(trx: Trx, shopId: string, accountId: string): Promise<Reader | undefined> {
  return trx('account')
    .leftJoin('membership', (join) =>
      join.on('membership.account_id', 'account.id').andOnVal('membership.shop_id', shopId),
    )
    .where({ 'account.id': accountId })
    .first<Reader | undefined>(
      'account.name as name',
      'account.clock as clock',
      trx.raw(
        `(membership.id is not null and membership.disabled_at is null and account.disabled_at is null) as "isMember"`,
      ),
    );
}

export const findLetterShop = (trx: Trx, shopId: string): Promise<LetterShop | undefined> =>
  trx('shop').where({ id: shopId }).first<LetterShop | undefined>({ name: 'name', timeZone: 'time_zone' });
