import { v7 as uuid } from 'uuid';
import type { PlaceFields } from '#contracts/places.ts';
import { recordChange } from '../db/changes.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { insertPlace, loadPlaces, lockPlace } from '../db/places.ts';
import { lockZone } from '../db/zones.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { placeView } from './place-view.ts';
import { isNameTaken, nameTaken } from './set-up-change.ts';

/** @throws {Refusal} bad-request where the name is used or the zone is not of this shop */
export function createPlace(deps: Deps, actor: Actor, fields: PlaceFields) {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    if (isNameTaken(await loadPlaces(trx, shopId), fields.name)) throw nameTaken();
    await mustBeZone(trx, shopId, fields.zoneId);
    const id = uuid();
    await insertPlace(trx, shopId, id, fields);
    const row = await lockPlace(trx, shopId, id);
    if (!row) throw notFound();
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: { place: fields.name, added: true } });
    return { place: placeView(row), clashes: [] };
  });
}

/** Holds the zone, so that nobody takes it away meanwhile. @throws {Refusal} bad-request where it is none of this shop */
export async function mustBeZone(trx: Trx, shopId: string, zoneId: string | null | undefined): Promise<void> {
  if (zoneId == null || (await lockZone(trx, shopId, zoneId))) return;
  throw new Refusal('bad-request', { fields: [{ path: 'body.zoneId', message: 'is no zone of this shop' }] });
}
