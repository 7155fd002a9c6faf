import type { Knex } from 'knex';
import type { Role } from '#contracts/common.ts';
import { asAccount } from './in-shop.ts';

export type Membership = { role: Role; personId: string | null };

/** The account's standing in a shop; undefined where it is no member, was disabled, or the shop does not exist. */
export function findMembership(db: Knex, who: { accountId: string; shopId: string }): Promise<Membership | undefined> {
  return asAccount(db, who.accountId, async (trx) =>
    trx('membership')
      .join('account', 'account.id', 'membership.account_id')
      .where({ 'membership.shop_id': who.shopId, 'membership.account_id': who.accountId })
      .whereNull('membership.disabled_at')
      .whereNull('account.disabled_at')
      .first({ role: 'membership.role', personId: 'membership.person_id' }),
  );
}
