import type { Me } from '#contracts/session.ts';
import { findAccount } from '../db/accounts.ts';
import { asAccount } from '../db/in-shop.ts';
import { listOwnShops } from '../db/own-shops.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';

/** What the browser knows of who is signed in. */
export async function readMe(deps: Deps, accountId: string, localMailbox: boolean): Promise<Me> {
  const account = await findAccount(deps.db, accountId);
  if (!account) throw new Refusal('not-signed-in');
  const shops = await asAccount(deps.db, accountId, (trx) => listOwnShops(trx, accountId));
  const { id, email, name, temperatureUnit, clock } = account;
  return {
    account: { id, email, name, temperatureUnit, clock },
    shops,
    serverTime: deps.now().toISOString(),
    localMailbox,
  };
}
