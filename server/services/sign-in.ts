import { findAccountByEmail, setPasswordHash } from '../db/accounts.ts';
import type { Deps } from '../deps.ts';
import type { SignedInAccount } from './find-signed-in.ts';
import { hashPassword, isPassword, isWeak } from './passwords.ts';

/**
 * The account of this address and password; undefined where either is wrong or the account is disabled, after the same
 * work in each case. A hash that is weaker than today's is made anew while the password is at hand.
 */
export async function signIn(
  deps: Deps,
  given: { email: string; password: string },
): Promise<SignedInAccount | undefined> {
  const account = await findAccountByEmail(deps.db, given.email);
  const isRight = await isPassword(deps, account?.passwordHash ?? null, given.password);
  if (!account || !isRight || account.disabledAt !== null) return undefined;
  if (account.passwordHash !== null && isWeak(deps, account.passwordHash))
    await setPasswordHash(deps.db, account.id, await hashPassword(deps, given.password));
  return account;
}
