import * as z from 'zod';
import { findAccount } from '#server/db/accounts.ts';
import { putReset } from '#server/db/tokens.ts';
import { resetLetter } from '#server/mail/letters/reset.tsx';
import { linkTo } from '#server/mail/links.ts';
import { hashOf, tokenFor } from '#server/services/one-time-token.ts';
import type { TaskFunction } from '../task-function.ts';
import { mailerOf } from './deliver.ts';

const payload = z.object({ accountId: z.uuid() });
const goodForMinutes = 30;

/** Nobody's account is nobody's letter: see services/ask-for-reset.ts. */
export const sendReset: TaskFunction = async (deps, task) => {
  const mailer = mailerOf(deps);
  const account = await findAccount(deps.db, payload.parse(task.payload).accountId);
  if (!account || account.disabledAt !== null) return;
  const token = tokenFor(deps.config, 'reset', task.id);
  await putReset(deps.db, {
    id: task.id,
    accountId: account.id,
    email: account.email,
    hash: hashOf(token),
    expiresAt: new Date(deps.now().getTime() + goodForMinutes * 60_000),
  });
  const link = linkTo(deps.config).reset(token);
  await mailer.send(account.email, task.id, await resetLetter({ name: account.name, link, goodForMinutes }));
};
