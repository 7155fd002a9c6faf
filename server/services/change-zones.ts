import { v7 as uuid } from 'uuid';
import type { Zone } from '#contracts/places.ts';
import { recordChange } from '../db/changes.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { loadZones, lockZone, placesInZone, putZone, renameZone, retireZone } from '../db/zones.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { isNameTaken, nameTaken } from './set-up-change.ts';
import { stillUsedBy } from './still-in-use.ts';

/** @throws {Refusal} bad-request where the name is used */
export function createZone(deps: Deps, actor: Actor, name: string): Promise<Zone> {
  return inShop(deps.db, actor, async (trx) => {
    if (isNameTaken(await loadZones(trx, actor.shopId), name)) throw nameTaken();
    const zone = await putZone(trx, actor.shopId, { id: uuid(), name });
    if (!zone) throw nameTaken();
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [zone.id], detail: { zone: name, added: true } });
    return zone;
  });
}

/** @throws {Refusal} not-found; stale with the zone as it is now; bad-request where the name is used */
export function changeZone(deps: Deps, actor: Actor, id: string, input: { name: string; version: number }) {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx): Promise<Zone> => {
    const before = await lockedZone(trx, shopId, id);
    if (before.name === input.name) return before;
    if (before.version !== input.version) throw new Refusal('stale', { current: before });
    if (isNameTaken(await loadZones(trx, shopId), input.name, id)) throw nameTaken();
    await renameZone(trx, shopId, id, input.name);
    const detail = { before: { name: before.name }, after: { name: input.name } };
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail });
    return lockedZone(trx, shopId, id);
  });
}

/** @throws {Refusal} not-found; stale; refused (still-used-by) with the places in it */
export function removeZone(deps: Deps, actor: Actor, id: string, version: number): Promise<void> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const before = await lockedZone(trx, shopId, id);
    if (before.version !== version) throw new Refusal('stale', { current: before });
    const places = await placesInZone(trx, shopId, id);
    if (places.length > 0) throw stillUsedBy(before.name, places);
    await retireZone(trx, shopId, id, deps.now());
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: { zone: before.name, removed: true } });
  });
}

async function lockedZone(trx: Trx, shopId: string, id: string): Promise<Zone> {
  const zone = await lockZone(trx, shopId, id);
  if (!zone) throw notFound();
  return zone;
}
