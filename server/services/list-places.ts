import type { Place, Zone } from '#contracts/places.ts';
import { inShop } from '../db/in-shop.ts';
import { loadPlaces } from '../db/places.ts';
import { loadZones } from '../db/zones.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';
import { placeView } from './place-view.ts';

export function listPlaces(deps: Deps, actor: Actor): Promise<{ places: Place[]; zones: Zone[] }> {
  return inShop(deps.db, actor, async (trx) => ({
    places: (await loadPlaces(trx, actor.shopId)).map(placeView),
    zones: await loadZones(trx, actor.shopId),
  }));
}
