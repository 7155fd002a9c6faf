import { createHash } from 'node:crypto';
import { v7 as uuid } from 'uuid';
import type { BodyOf } from '#contracts/endpoint.ts';
import type { signUp as contract } from '#contracts/sign-up.ts';
import type { Config } from '../config.ts';
import { findAccount, findAccountByEmail, insertAccount, type AccountRow } from '../db/accounts.ts';
import { inShop } from '../db/in-shop.ts';
import { findSignUp, insertSignUp, useSignUp } from '../db/sign-up-tokens.ts';
import { enqueue } from '../db/tasks.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import { putShop } from './create-shop.ts';
import { hashOf } from './one-time-token.ts';
import { hashPassword } from './passwords.ts';

/** Closed in production unless the environment opens it: a server of one's own is nobody else's. */
export const isSignUpOpen = ({ SIGN_UP, NODE_ENV }: Config): boolean =>
  SIGN_UP === undefined ? NODE_ENV !== 'production' : SIGN_UP === 'open';

const goodFor = 86_400_000;

/**
 * Queues a letter to an address that wants to open a shop, at most one a minute. Known or not, the same rows are written:
 * what the letter says is decided when it is sent, and only who reads it learns whether there is an account.
 * @throws {Refusal} not-found where sign-up is closed
 */
export async function askToSignUp(deps: Deps, email: string): Promise<void> {
  if (!isSignUpOpen(deps.config)) throw notFound();
  const minute = Math.floor(deps.now().getTime() / 60_000);
  const address = createHash('sha256').update(email.toLowerCase()).digest('base64url');
  await deps.db.transaction(async (trx) => {
    const id = uuid();
    await insertSignUp(trx, { id, email, expiresAt: new Date(deps.now().getTime() + goodFor) });
    await enqueue(trx, { kind: 'send-sign-up', key: `${address}:${minute}`, shopId: null, payload: { tokenId: id } });
  });
}

/** @throws {Refusal} gone where the link is unknown, used or too old */
export async function readSignUpLink(deps: Deps, token: string): Promise<{ email: string }> {
  const email = await findSignUp(deps.db, hashOf(token), deps.now());
  if (email === undefined) throw new Refusal('gone');
  return { email };
}

/**
 * Makes the account of the address the link was sent to, and its shop, in one transaction.
 * @throws {Refusal} gone where the link is of no use (any more) or the address has an account meanwhile
 */
export async function signUp(deps: Deps, given: BodyOf<typeof contract>): Promise<AccountRow> {
  const hash = hashOf(given.token);
  const { email } = await readSignUpLink(deps, given.token);
  if (await findAccountByEmail(deps.db, email)) throw new Refusal('gone');
  const passwordHash = await hashPassword(deps, given.password);
  const accountId = uuid();
  return inShop(deps.db, { shopId: given.shop.id, accountId }, async (trx) => {
    if (!(await useSignUp(trx, hash, deps.now()))) throw new Refusal('gone');
    await insertAccount(trx, { id: accountId, email, name: given.name, passwordHash });
    await putShop(trx, accountId, given.shop);
    const account = await findAccount(trx, accountId);
    if (!account) throw new Refusal('gone');
    return account;
  });
}
