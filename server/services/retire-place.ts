import type { Place } from '#contracts/places.ts';
import { bookedOn } from '../db/booked-on.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { retirePlaceRow } from '../db/places.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { lockedPlace } from './change-place.ts';
import { placeView } from './place-view.ts';
import { stillBooked } from './still-in-use.ts';

/**
 * Takes a place out of use; what happened in it stays on record.
 * @throws {Refusal} not-found; stale; refused (still-booked) with the posted work that is still to be done there
 */
export function retirePlace(deps: Deps, actor: Actor, id: string, version: number): Promise<Place> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    // Whoever posts holds this row, so nothing is booked there between the look and the deed.
    const before = await lockedPlace(trx, shopId, id);
    if (before.retired) return placeView(before);
    if (before.version !== version) throw new Refusal('stale', { current: placeView(before) });
    const booked = await bookedOn(trx, shopId, { placeId: id }, deps.now());
    if (booked.length > 0) throw stillBooked(before.name, booked);
    await retirePlaceRow(trx, shopId, id, deps.now());
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: { place: before.name, retired: true } });
    return placeView(await lockedPlace(trx, shopId, id));
  });
}

/** @throws {Refusal} not-found; stale */
export function bringBackPlace(deps: Deps, actor: Actor, id: string, version: number): Promise<Place> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const before = await lockedPlace(trx, shopId, id);
    if (!before.retired) return placeView(before);
    if (before.version !== version) throw new Refusal('stale', { current: placeView(before) });
    await retirePlaceRow(trx, shopId, id, null);
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: { place: before.name, retired: false } });
    return placeView(await lockedPlace(trx, shopId, id));
  });
}
