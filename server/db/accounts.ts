import type { Knex } from 'knex';

export type AccountRow = {
  id: string;
  email: string;
  name: string;
  temperatureUnit: 'C' | 'F';
  clock: '24' | '12';
  /** Null until the account has a password. */
  passwordHash: string | null;
  disabledAt: Date | null;
};

const columns = {
  id: 'id',
  email: 'email',
  name: 'name',
  temperatureUnit: 'temperature_unit',
  clock: 'clock',
  passwordHash: 'password_hash',
  disabledAt: 'disabled_at',
};

export const findAccount = (db: Knex, id: string): Promise<AccountRow | undefined> =>
  db('account').where({ id }).first<AccountRow | undefined>(columns);

/** Addresses are compared without regard to capitals. */
export const findAccountByEmail = (db: Knex, email: string): Promise<AccountRow | undefined> =>
  db('account').where({ email }).first<AccountRow | undefined>(columns);

/** Accounts that may sign in, of all shops. */
export async function listAccountIds(db: Knex): Promise<string[]> {
  const rows = await db('account').whereNull('disabled_at').orderBy('id').select<{ id: string }[]>('id');
  return rows.map(({ id }) => id);
}

export async function insertAccount(
  db: Knex,
  account: Pick<AccountRow, 'id' | 'email' | 'name' | 'passwordHash'>,
): Promise<void> {
  const { passwordHash, ...rest } = account;
  await db('account').insert({ ...rest, password_hash: passwordHash });
}

export async function updateAccount(
  db: Knex,
  id: string,
  changed: { [K in 'name' | 'temperatureUnit' | 'clock']?: AccountRow[K] | undefined },
): Promise<void> {
  const { name, temperatureUnit, clock } = changed;
  const row = { name, temperature_unit: temperatureUnit, clock };
  if (Object.values(row).every((value) => value === undefined)) return;
  await db('account').where({ id }).update(row);
}

export async function setPasswordHash(db: Knex, id: string, passwordHash: string): Promise<void> {
  await db('account').where({ id }).update({ password_hash: passwordHash });
}
