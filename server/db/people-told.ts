import type { Trx } from './in-shop.ts';

export type Told = { personId: string; personName: string; accountId: string; email: string };

/** The accounts that work as these people and may still sign in: who hears of a change in their work. */
export async function accountsOfPeople(trx: Trx, shopId: string, personIds: readonly string[]): Promise<Told[]> {
  return trx('membership')
    .join('account', 'account.id', 'membership.account_id')
    .join('person', (on) => on.on('person.shop_id', 'membership.shop_id').on('person.id', 'membership.person_id'))
    .where({ 'membership.shop_id': shopId })
    .whereIn('membership.person_id', personIds)
    .whereNull('membership.disabled_at')
    .whereNull('account.disabled_at')
    .orderBy(['person.name', 'account.email'])
    .select<Told[]>({
      personId: 'person.id',
      personName: 'person.name',
      accountId: 'account.id',
      email: 'account.email',
    });
}
