import type { Lamp } from '#contracts/lamps.ts';
import { bookedOn } from '../db/booked-on.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { retireLampRow, setLampOrder } from '../db/lamps.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { lockedLamp } from './change-lamp.ts';
import { stillBooked } from './still-in-use.ts';

/**
 * Takes a lamp out of use; what it did stays on record.
 * @throws {Refusal} not-found; stale; refused (still-booked) with the posted work that counts on it
 */
export function retireLamp(deps: Deps, actor: Actor, id: string, version: number): Promise<Lamp> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const before = await lockedLamp(trx, shopId, id);
    if (before.retired) return before;
    if (before.version !== version) throw new Refusal('stale', { current: before });
    const booked = await bookedOn(trx, shopId, { lampId: id }, deps.now());
    if (booked.length > 0) throw stillBooked(before.name, booked);
    await retireLampRow(trx, shopId, id, deps.now());
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: { lamp: before.name, retired: true } });
    return lockedLamp(trx, shopId, id);
  });
}

/** @throws {Refusal} not-found; stale */
export function bringBackLamp(deps: Deps, actor: Actor, id: string, version: number): Promise<Lamp> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const before = await lockedLamp(trx, shopId, id);
    if (!before.retired) return before;
    if (before.version !== version) throw new Refusal('stale', { current: before });
    await retireLampRow(trx, shopId, id, null);
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: { lamp: before.name, retired: false } });
    return lockedLamp(trx, shopId, id);
  });
}

/** @throws {Refusal} not-found where an id is no lamp of this shop */
export function orderLamps(deps: Deps, actor: Actor, ids: string[]): Promise<void> {
  return inShop(deps.db, actor, async (trx) => {
    const placed = await setLampOrder(trx, actor.shopId, ids);
    if (placed !== new Set(ids).size) throw notFound();
    await recordChange(trx, actor, { kind: 'shop-changed', ids, detail: { ordered: true } });
  });
}
