import * as z from 'zod';
import { inShop, type Trx } from '#server/db/in-shop.ts';
import { findLetter, setLetterState, type LetterRow, type LetterState } from '#server/db/letters.ts';
import type { Task } from '#server/db/task-queue.ts';
import { Undeliverable, type Letter, type Mailer } from '#server/mail/mailer.ts';
import { GiveUp, shopOf, type JobDeps } from '../task-function.ts';

const payload = z.object({ letterId: z.uuid() });

export const messageOf = (error: unknown): string =>
  (error instanceof Error ? error.message : String(error)).replace(/\p{Cc}+/gu, ' ').slice(0, 500);

export function mailerOf(deps: JobDeps): Mailer {
  if (!deps.mailer) throw new Error('no mail server is set (SMTP_URL)');
  return deps.mailer;
}

const asShop = <T>(deps: JobDeps, shopId: string, work: (trx: Trx) => Promise<T>): Promise<T> =>
  inShop(deps.db, { shopId, accountId: null }, work);

function settle(deps: JobDeps, task: Task, letterId: string, state: LetterState, lastError: string | null) {
  const shopId = shopOf(task);
  const sentAt = state === 'sent' ? deps.now() : null;
  return asShop(deps, shopId, (trx) => setLetterState(trx, shopId, letterId, { state, lastError, sentAt }));
}

/**
 * Sends a letter of a shop's outbox. Looks at it anew first: what was sent or dropped meanwhile is left alone, and `compose`
 * answers null where the letter makes no sense any more. After a crash between sending and noting that, it goes out
 * again under the same Message-ID.
 */
export async function deliver(
  deps: JobDeps,
  task: Task,
  compose: (trx: Trx, shopId: string, letter: LetterRow) => Promise<Letter | null>,
): Promise<void> {
  const mailer = mailerOf(deps);
  const { letterId } = payload.parse(task.payload);
  const shopId = shopOf(task);
  const found = await asShop(deps, shopId, async (trx) => {
    const letter = await findLetter(trx, shopId, letterId);
    if (letter?.state !== 'queued') return null;
    return { to: letter.to, composed: await compose(trx, shopId, letter) };
  });
  if (!found) return;
  if (!found.composed) return void (await settle(deps, task, letterId, 'dropped', null));
  try {
    await mailer.send(found.to, letterId, found.composed);
  } catch (error) {
    await settle(deps, task, letterId, 'queued', messageOf(error));
    throw error instanceof Undeliverable ? new GiveUp(error.message, { cause: error }) : error;
  }
  await settle(deps, task, letterId, 'sent', null);
}

/** A letter that was given up stays in the outbox, where the owner sees it and why. */
export async function letterIsDead(deps: JobDeps, task: Task, error: string): Promise<void> {
  const { letterId } = payload.parse(task.payload);
  await settle(deps, task, letterId, 'dead', error);
}
