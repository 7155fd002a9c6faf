import { hash } from '@node-rs/argon2';
import type { Knex } from 'knex';
import { v7 as uuid } from 'uuid';
import type { Role } from '#contracts/common.ts';
import { cheapHashing } from './app.ts';

/** Counts up, so that no two names or addresses of one test file are the same. */
let made = 0;
const next = () => (made += 1);

export const password = 'correct horse battery staple';
let hashed: Promise<string> | undefined;
const hashedPassword = () => (hashed ??= hash(password, cheapHashing));

/** A shop with no rows but its own, made past row level security with the owner's connection. */
export async function makeShop(
  owner: Knex,
  given: { name?: string; timeZone?: string } = {},
): Promise<{ id: string; name: string; timeZone: string }> {
  const shop = { id: uuid(), name: given.name ?? `Shop ${next()}`, timeZone: given.timeZone ?? 'America/New_York' };
  await owner('shop').insert({
    id: shop.id,
    name: shop.name,
    time_zone: shop.timeZone,
    objective: JSON.stringify({ tardiness: 10, flow: 1, makespan: 1, booth: 1, moves: 1, unplaced: 10_000 }),
  });
  return shop;
}

export type MadeMember = {
  accountId: string;
  memberId: string;
  personId: string | null;
  shopId: string;
  role: Role;
  name: string;
  email: string;
  password: string;
};

/** An account with the password above and its membership; `account` makes it a member of a second shop. */
export async function makeMember(
  owner: Knex,
  shop: { id: string },
  given: { role: Role; personId?: string | null; name?: string; email?: string; account?: { accountId: string } },
): Promise<MadeMember> {
  const number = next();
  const name = given.name ?? `${given.role} ${number}`;
  const email = given.email ?? `${given.role}${number}@shop.test`;
  const accountId = given.account?.accountId ?? uuid();
  if (!given.account)
    await owner('account').insert({ id: accountId, email, name, password_hash: await hashedPassword() });
  const memberId = uuid();
  const personId = given.personId ?? null;
  await owner('membership').insert({
    shop_id: shop.id,
    id: memberId,
    account_id: accountId,
    role: given.role,
    person_id: personId,
  });
  return { accountId, memberId, personId, shopId: shop.id, role: given.role, name, email, password };
}

/** A person of the shop's roster. */
export async function makePerson(
  owner: Knex,
  shop: { id: string },
  given: { name?: string; skills?: string[]; sprayTrainedOn?: string | null } = {},
): Promise<{ id: string; name: string }> {
  const person = { id: uuid(), name: given.name ?? `Person ${next()}` };
  await owner('person').insert({
    shop_id: shop.id,
    ...person,
    skills: given.skills ?? [],
    spray_trained_on: given.sprayTrainedOn ?? null,
  });
  return person;
}
