import { hash } from '@node-rs/argon2';
import type { Role } from '#contracts/common.ts';
import { insertAccount } from '#server/db/accounts.ts';
import type { Trx } from '#server/db/in-shop.ts';
import signIns from './demo-sign-ins.json' with { type: 'json' };
import { demoId } from './ids.ts';
import { people } from './people.ts';

/** As dear as in the product: a demo shop is reachable like any other. */
const cost = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export const accountOf = (name: string): string | null =>
  signIns.some((account) => account.name === name) ? demoId('account', name) : null;

const personOf = (name: string): string | null =>
  people.some((person) => person.name === name) ? demoId('person', name) : null;

/** Gives the demo's accounts, as far as they are members still, the roles and people they began with. */
export async function tieAccounts(trx: Trx, shopId: string): Promise<void> {
  for (const { name, role } of signIns)
    await trx('membership')
      .where({ shop_id: shopId, id: demoId('membership', name) })
      .update({ role, person_id: personOf(name), disabled_at: null });
}

export async function putInAccounts(trx: Trx, shopId: string): Promise<void> {
  for (const { name, email, password, role } of signIns) {
    const id = demoId('account', name);
    await insertAccount(trx, { id, name, email, passwordHash: await hash(password, cost) });
    await trx('membership').insert({
      shop_id: shopId,
      id: demoId('membership', name),
      account_id: id,
      role: role as Role,
      person_id: personOf(name),
    });
  }
}
