import { createHash } from 'node:crypto';
import { v4 as uuid } from 'uuid';
import { findAccountByEmail } from '../db/accounts.ts';
import { enqueue } from '../db/tasks.ts';
import type { Deps } from '../deps.ts';

/**
 * Queues a letter with a reset link, at most one a minute for an address. An address without an account queues the same
 * work for an account that is nobody's: the answer, its time and its traces tell nothing about who has an account.
 */
export async function askForReset(deps: Deps, email: string): Promise<void> {
  const minute = Math.floor(deps.now().getTime() / 60_000);
  const address = createHash('sha256').update(email.toLowerCase()).digest('base64url');
  await deps.db.transaction(async (trx) => {
    const account = await findAccountByEmail(trx, email);
    await enqueue(trx, {
      kind: 'send-reset',
      key: `${address}:${minute}`,
      shopId: null,
      payload: { accountId: account?.id ?? uuid() },
    });
  });
}
