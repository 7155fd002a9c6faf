import { v7 as uuid } from 'uuid';
import { findAccount, findAccountByEmail, insertAccount, setPasswordHash, type AccountRow } from '../db/accounts.ts';
import { recordChange } from '../db/changes.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { putMember } from '../db/members.ts';
import { giveShopUnits } from '../db/shop.ts';
import { findOpenInvitation, useInvitation } from '../db/tokens.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import { hashOf } from './one-time-token.ts';
import { hashPassword, isPassword } from './passwords.ts';

type Given = { token: string; name: string; password: string };

/**
 * Makes who was invited a member. Someone who has an account proves it with its password; else one is made.
 * @throws {Refusal} gone where the link is unknown, used, withdrawn or too old or the account is disabled;
 *   wrong-credentials where the account's password is another one
 */
export async function acceptInvitation(deps: Deps, given: Given): Promise<AccountRow> {
  const hash = hashOf(given.token);
  const invitation = await findOpenInvitation(deps.db, hash, deps.now());
  if (!invitation) throw new Refusal('gone');
  const existing = await findAccountByEmail(deps.db, invitation.email);
  const passwordHash = existing?.passwordHash ? null : await hashPassword(deps, given.password);
  if (existing) await mustMatch(deps, existing, given.password);
  const accountId = existing?.id ?? uuid();
  const { shopId, role, personId, email } = invitation;
  return inShop(deps.db, { shopId, accountId }, async (trx) => {
    if (!(await useInvitation(trx, hash, deps.now()))) throw new Refusal('gone');
    await putAccount(trx, { id: accountId, email, name: given.name, passwordHash }, existing !== undefined);
    if (!existing) await giveShopUnits(trx, shopId, accountId);
    await putMember(trx, shopId, { id: uuid(), accountId, role, personId });
    await recordChange(trx, { shopId, accountId }, { kind: 'member-changed', ids: [accountId], detail: { role } });
    const account = await findAccount(trx, accountId);
    if (!account) throw new Refusal('gone');
    return account;
  });
}

async function mustMatch(deps: Deps, account: AccountRow, password: string): Promise<void> {
  if (account.disabledAt !== null) throw new Refusal('gone');
  if (account.passwordHash !== null && !(await isPassword(deps, account.passwordHash, password)))
    throw new Refusal('wrong-credentials');
}

async function putAccount(
  trx: Trx,
  account: { id: string; email: string; name: string; passwordHash: string | null },
  exists: boolean,
): Promise<void> {
  if (!exists) await insertAccount(trx, account);
  else if (account.passwordHash !== null) await setPasswordHash(trx, account.id, account.passwordHash);
}
