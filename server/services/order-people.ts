import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { loadPeople, setPeopleOrder } from '../db/people.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import type { Actor } from '../policies.ts';

/** @throws {Refusal} not-found where an id is nobody's of this shop */
export function orderPeople(deps: Deps, actor: Actor, personIds: string[]): Promise<void> {
  return inShop(deps.db, actor, async (trx) => {
    const people = await loadPeople(trx, actor.shopId);
    const known = new Set(people.map(({ id }) => id));
    if (personIds.some((id) => !known.has(id))) throw notFound();
    await setPeopleOrder(trx, actor.shopId, personIds);
    await recordChange(trx, actor, { kind: 'people-changed', ids: personIds, detail: { ordered: true } });
  });
}
