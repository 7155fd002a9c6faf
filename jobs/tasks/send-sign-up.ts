import * as z from 'zod';
import { findAccountByEmail } from '#server/db/accounts.ts';
import { findSignUpById, setSignUpHash } from '#server/db/sign-up-tokens.ts';
import { hasAccountLetter, signUpLetter } from '#server/mail/letters/sign-up.tsx';
import { linkTo } from '#server/mail/links.ts';
import { hashOf, tokenFor } from '#server/services/one-time-token.ts';
import type { TaskFunction } from '../task-function.ts';
import { mailerOf } from './deliver.ts';

const payload = z.object({ tokenId: z.uuid() });

/** The link's hash is kept before the letter leaves, so that no letter is out whose link does not work. */
export const sendSignUp: TaskFunction = async (deps, task) => {
  const mailer = mailerOf(deps);
  const { tokenId } = payload.parse(task.payload);
  const email = await findSignUpById(deps.db, tokenId, deps.now());
  if (email === undefined) return;
  const links = linkTo(deps.config);
  const account = await findAccountByEmail(deps.db, email);
  if (account && account.disabledAt !== null) return;
  if (account) {
    await mailer.send(email, task.id, await hasAccountLetter({ name: account.name, link: links.signIn() }));
    return;
  }
  const token = tokenFor(deps.config, 'sign-up', tokenId);
  await setSignUpHash(deps.db, tokenId, hashOf(token));
  await mailer.send(email, task.id, await signUpLetter({ link: links.signUp(token) }));
};
