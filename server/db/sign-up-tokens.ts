import type { Knex } from 'knex';

/** An address that asked to open a shop. The link is made when the letter is sent. */
export async function insertSignUp(db: Knex, row: { id: string; email: string; expiresAt: Date }): Promise<void> {
  await db('account_token').insert({ id: row.id, kind: 'sign-up', email: row.email, expires_at: row.expiresAt });
}

const open = (db: Knex, now: Date) =>
  db('account_token').where({ kind: 'sign-up', used_at: null }).andWhere('expires_at', '>', now);

export async function findSignUpById(db: Knex, id: string, now: Date): Promise<string | undefined> {
  const row = await open(db, now).andWhere({ id }).first<{ email: string } | undefined>('email');
  return row?.email;
}

export async function setSignUpHash(db: Knex, id: string, hash: Buffer): Promise<void> {
  await db('account_token').where({ kind: 'sign-up', id }).update({ token_hash: hash });
}

/** The address a link is for; undefined where it is unknown, used or too old. */
export async function findSignUp(db: Knex, hash: Buffer, now: Date): Promise<string | undefined> {
  const row = await open(db, now).andWhere({ token_hash: hash }).first<{ email: string } | undefined>('email');
  return row?.email;
}

/** Uses up a link; of two at the same time one gets `true`. */
export const useSignUp = async (db: Knex, hash: Buffer, now: Date): Promise<boolean> =>
  (await open(db, now).andWhere({ token_hash: hash }).update({ used_at: now })) === 1;
