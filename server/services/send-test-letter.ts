import { findAccount } from '../db/accounts.ts';
import { inShop } from '../db/in-shop.ts';
import { queueLetter } from '../db/letters.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import type { Actor } from '../policies.ts';

const minute = 60_000;

/** Puts a letter to who asks into the outbox, where it goes the way of every letter. At most one a minute and account. */
export function sendTestLetter(deps: Deps, actor: Actor): Promise<{ to: string }> {
  return inShop(deps.db, actor, async (trx) => {
    const account = await findAccount(trx, actor.accountId);
    if (!account) throw notFound();
    await queueLetter(trx, actor, {
      kind: 'test',
      accountId: account.id,
      toEmail: account.email,
      subjectId: account.id,
      subjectVersion: Math.floor(deps.now().getTime() / minute),
      data: { askedAt: deps.now().toISOString() },
    });
    return { to: account.email };
  });
}
