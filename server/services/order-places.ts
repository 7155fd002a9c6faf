import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { setPlaceOrder } from '../db/places.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import type { Actor } from '../policies.ts';

/** @throws {Refusal} not-found where an id is no place of this shop */
export function orderPlaces(deps: Deps, actor: Actor, ids: string[]): Promise<void> {
  return inShop(deps.db, actor, async (trx) => {
    const placed = await setPlaceOrder(trx, actor.shopId, ids);
    if (placed !== new Set(ids).size) throw notFound();
    await recordChange(trx, actor, { kind: 'shop-changed', ids, detail: { ordered: true } });
  });
}
