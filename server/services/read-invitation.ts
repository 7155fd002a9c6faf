import type { ReplyOf } from '#contracts/endpoint.ts';
import type { readInvitation as contract } from '#contracts/session.ts';
import { findAccountByEmail } from '../db/accounts.ts';
import { inShop } from '../db/in-shop.ts';
import { findShopName } from '../db/members.ts';
import { findOpenInvitation } from '../db/tokens.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import { hashOf } from './one-time-token.ts';

/** @throws {Refusal} gone where the link is unknown, used, withdrawn or too old */
export async function readInvitation(deps: Deps, token: string): Promise<ReplyOf<typeof contract>> {
  const invitation = await findOpenInvitation(deps.db, hashOf(token), deps.now());
  if (!invitation) throw new Refusal('gone');
  const { shopId, email, role } = invitation;
  const shopName = await inShop(deps.db, { shopId, accountId: null }, (trx) => findShopName(trx, shopId));
  if (shopName === undefined) throw new Refusal('gone');
  const account = await findAccountByEmail(deps.db, email);
  return { shopName, email, role, hasAccount: account !== undefined && account.passwordHash !== null };
}
