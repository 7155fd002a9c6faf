import type * as z from 'zod';
import type { listLetters as contract } from '#contracts/mailbox.ts';
import { inShop } from '../db/in-shop.ts';
import * as rows from '../db/letters.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';

/** The shop's outbox, newest first: what waits, what was sent, what could not be delivered and why. */
export async function listLetters(
  deps: Deps,
  actor: Actor,
  state: rows.LetterState | undefined,
): Promise<z.input<(typeof contract)['reply']>> {
  const letters = await inShop(deps.db, actor, (trx) => rows.listLetters(trx, actor.shopId, state));
  return {
    letters: letters.map((letter) => ({
      ...letter,
      createdAt: letter.createdAt.toISOString(),
      sentAt: letter.sentAt?.toISOString() ?? null,
    })),
  };
}
