import { findAccount, setPasswordHash } from '../db/accounts.ts';
import { endSessionsOf } from '../db/sessions.ts';
import { findOpenReset, useReset } from '../db/tokens.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import { hashOf } from './one-time-token.ts';
import { hashPassword } from './passwords.ts';

/**
 * Sets the password by a link from a letter and ends all sessions of the account.
 * @throws {Refusal} gone where the link is unknown, used or too old, or the account is disabled
 */
export async function resetPassword(deps: Deps, given: { token: string; password: string }): Promise<void> {
  const hash = hashOf(given.token);
  const accountId = await findOpenReset(deps.db, hash, deps.now());
  const account = accountId === undefined ? undefined : await findAccount(deps.db, accountId);
  if (!account || account.disabledAt !== null) throw new Refusal('gone');
  const passwordHash = await hashPassword(deps, given.password);
  await deps.db.transaction(async (trx) => {
    if (!(await useReset(trx, hash, account.id, deps.now()))) throw new Refusal('gone');
    await setPasswordHash(trx, account.id, passwordHash);
    await endSessionsOf(trx, account.id);
  });
}
