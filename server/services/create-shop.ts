import { v7 as uuid } from 'uuid';
import { recordChange } from '../db/changes.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { findOwnMember } from '../db/first-steps.ts';
import { putMember } from '../db/members.ts';
import { insertShop } from '../db/new-shop.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import { starterShop } from '../starter/shop.ts';

type Given = { id: string; name: string; timeZone: string };

/**
 * An empty shop of which the account is the owner. The same id again is the same shop.
 * @throws {Refusal} key-reused where the id belongs to somebody else's shop
 */
export function createShop(deps: Deps, accountId: string, given: Given): Promise<void> {
  return inShop(deps.db, { shopId: given.id, accountId }, (trx) => putShop(trx, accountId, given));
}

export async function putShop(trx: Trx, accountId: string, given: Given): Promise<void> {
  const { id } = given;
  if (!(await insertShop(trx, { ...starterShop, ...given }))) {
    if ((await findOwnMember(trx, id, accountId)) === undefined) throw new Refusal('key-reused');
    return;
  }
  await putMember(trx, id, { id: uuid(), accountId, role: 'owner', personId: null });
  await recordChange(
    trx,
    { shopId: id, accountId },
    { kind: 'shop-changed', ids: [id], detail: { opened: given.name, timeZone: given.timeZone } },
  );
}
