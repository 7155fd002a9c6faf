import type { Knex } from 'knex';
import type { Actor } from '../policies.ts';

export type Trx = Knex.Transaction;

/** Where a transaction acts: the shop it may see and write, and for whom. */
export type Scope = Pick<Actor, 'shopId'> & { accountId: string | null };

/**
 * One transaction in one shop. Row level security shows and takes only rows of that shop; everything commits or nothing.
 */
export function inShop<T>(db: Knex, scope: Scope, work: (trx: Trx) => Promise<T>): Promise<T> {
  return db.transaction(async (trx) => {
    await trx.raw(`select set_config('app.shop_id', ?, true), set_config('app.account_id', ?, true)`, [
      scope.shopId,
      scope.accountId ?? '',
    ]);
    return work(trx);
  });
}

/** A transaction of an account outside any shop: it sees the own memberships and those shops' names. */
export function asAccount<T>(db: Knex, accountId: string, work: (trx: Trx) => Promise<T>): Promise<T> {
  return db.transaction(async (trx) => {
    await trx.raw(`select set_config('app.account_id', ?, true)`, [accountId]);
    return work(trx);
  });
}
