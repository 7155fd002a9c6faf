import { setPasswordHash } from '../db/accounts.ts';
import { endSessionsOf } from '../db/sessions.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { SignedInAccount } from './find-signed-in.ts';
import { hashPassword, isPassword } from './passwords.ts';

/**
 * Gives the account a new password and ends all its sessions and live streams; the caller starts a new one for who asked.
 * @throws {Refusal} wrong-credentials where the current password is not right
 */
export async function changePassword(
  deps: Deps,
  account: SignedInAccount,
  given: { currentPassword: string; newPassword: string },
): Promise<void> {
  if (!(await isPassword(deps, account.passwordHash, given.currentPassword))) throw new Refusal('wrong-credentials');
  const passwordHash = await hashPassword(deps, given.newPassword);
  await deps.db.transaction(async (trx) => {
    await setPasswordHash(trx, account.id, passwordHash);
    await endSessionsOf(trx, account.id);
  });
}
