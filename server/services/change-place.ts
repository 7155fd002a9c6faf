import type { PlaceFields } from '#contracts/places.ts';
import { recordChange } from '../db/changes.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { loadPlaces, lockPlace, updatePlace, type PlaceRow } from '../db/places.ts';
import { tryAgain } from '../db/try-again.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import { tellClashes } from '../planning/posted-clashes.ts';
import type { Actor } from '../policies.ts';
import { mustBeZone } from './create-place.ts';
import { placeView } from './place-view.ts';
import { beforeAndAfter, differing, isNameTaken, nameTaken, type Given } from './set-up-change.ts';

/**
 * Changes the fields that are given; what says the same as before changes nothing. Posted work that the place no longer
 * suits is told, not moved.
 * @throws {Refusal} not-found; stale with the place as it is now; bad-request for a name in use or a foreign zone
 */
export function changePlace(deps: Deps, actor: Actor, id: string, input: Given<PlaceFields> & { version: number }) {
  const { version, ...given } = input;
  const { shopId } = actor;
  return tryAgain(() =>
    inShop(deps.db, actor, async (trx) => {
      const before = await lockedPlace(trx, shopId, id);
      const fields = differing<PlaceFields>(before, given);
      if (Object.keys(fields).length === 0) return { place: placeView(before), clashes: [] };
      if (before.version !== version) throw new Refusal('stale', { current: placeView(before) });
      if (fields.name !== undefined && isNameTaken(await loadPlaces(trx, shopId), fields.name, id)) throw nameTaken();
      await mustBeZone(trx, shopId, fields.zoneId);
      const { clashes } = await tellClashes(trx, shopId, deps.now(), () => updatePlace(trx, shopId, id, fields));
      await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: beforeAndAfter(before, fields) });
      return { place: placeView(await lockedPlace(trx, shopId, id)), clashes };
    }),
  );
}

/** @throws {Refusal} not-found */
export async function lockedPlace(trx: Trx, shopId: string, id: string): Promise<PlaceRow> {
  const row = await lockPlace(trx, shopId, id);
  if (!row) throw notFound();
  return row;
}
