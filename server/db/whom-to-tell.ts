import type { Role } from '#contracts/common.ts';
import type { Trx } from './in-shop.ts';

/** Accounts of these roles that may sign in. */
export const membersOfRoles = (
  trx: Trx,
  shopId: string,
  roles: readonly Role[],
): Promise<{ accountId: string; email: string }[]> =>
  trx('membership')
    .join('account', 'account.id', 'membership.account_id')
    .where({ 'membership.shop_id': shopId })
    .whereIn('membership.role', roles)
    .whereNull('membership.disabled_at')
    .whereNull('account.disabled_at')
    .orderBy('account.email')
    .select({ accountId: 'account.id', email: 'account.email' });
