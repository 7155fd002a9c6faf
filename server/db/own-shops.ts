import type { Me } from '#contracts/session.ts';
import type { Trx } from './in-shop.ts';

/** The shops an account may enter, by name. Needs a transaction of that account (asAccount). */
export const listOwnShops = (trx: Trx, accountId: string): Promise<Me['shops']> =>
  trx('membership')
    .join('shop', 'shop.id', 'membership.shop_id')
    .where({ 'membership.account_id': accountId })
    .whereNull('membership.disabled_at')
    .orderBy(['shop.name', 'shop.id'])
    .select({
      id: 'shop.id',
      name: 'shop.name',
      timeZone: 'shop.time_zone',
      role: 'membership.role',
      personId: 'membership.person_id',
    });
