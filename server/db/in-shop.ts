import { AsyncLocalStorage } from 'node:async_hooks';
import type { Knex } from 'knex';
import type { Actor } from '../policies.ts';

export type Trx = Knex.Transaction;

/** Where a transaction acts: the shop it may see and write, and for whom. */
export type Scope = Pick<Actor, 'shopId'> & { accountId: string | null };

type Joined = { trx: Trx; scope: Scope };
const joined = new AsyncLocalStorage<Joined>();

/** Runs `work` so that each `inShop` of the same shop and account inside it is a part of `trx` and commits with it. */
export const joinedTo = <T>(trx: Trx, scope: Scope, work: () => Promise<T>): Promise<T> =>
  joined.run({ trx, scope }, work);

/**
 * One transaction in one shop. Row level security shows and takes only rows of that shop; everything commits or nothing.
 * Within `joinedTo` it is a savepoint of the outer transaction: its failure undoes only its own part.
 */
export function inShop<T>(db: Knex, scope: Scope, work: (trx: Trx) => Promise<T>): Promise<T> {
  const outer = joined.getStore();
  if (outer && outer.scope.shopId === scope.shopId && outer.scope.accountId === scope.accountId)
    return outer.trx.transaction(work);
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
