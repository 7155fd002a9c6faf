import { v7 as uuid } from 'uuid';
import type { PersonFields } from '#contracts/people.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { insertPerson, replaceShifts, tieMember } from '../db/people.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { personInShop } from './person-view.ts';

/** @throws {Refusal} bad-request where the member is not of this shop */
export function createPerson(deps: Deps, actor: Actor, fields: PersonFields) {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const id = uuid();
    await insertPerson(trx, shopId, { id, ...fields });
    await replaceShifts(trx, shopId, id, fields.shifts);
    if (fields.memberId !== null && !(await tieMember(trx, shopId, id, fields.memberId))) throw noSuchMember();
    await recordChange(trx, actor, { kind: 'people-changed', ids: [id], detail: { added: fields.name } });
    return { person: await personInShop(trx, shopId, id, deps.now()), clashes: [] };
  });
}

export const noSuchMember = (): Refusal =>
  new Refusal('bad-request', { fields: [{ path: 'body.memberId', message: 'is no member of this shop' }] });
