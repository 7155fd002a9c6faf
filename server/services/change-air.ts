import type { AirHours, AirSettings, AirSource, AirView } from '#contracts/air.ts';
import { listZones, putAirSettings, putZoneAir } from '../db/air.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { airInShop } from './read-air.ts';

/** @throws {Refusal} stale with the air as it is set now. */
export function changeAirSettings(deps: Deps, actor: Actor, settings: AirSettings): Promise<AirView> {
  return inShop(deps.db, actor, async (trx) => {
    if (!(await putAirSettings(trx, actor.shopId, settings)))
      throw new Refusal('stale', { current: await airInShop(trx, actor.shopId, deps.now()) });
    await recordChange(trx, actor, { kind: 'air-read', ids: [actor.shopId], detail: { settings } });
    return airInShop(trx, actor.shopId, deps.now());
  });
}

/** Where the planner takes a zone's air from. @throws {Refusal} not-found, bad-request, or stale with the air of now. */
export function changeZoneAir(
  deps: Deps,
  actor: Actor,
  zoneId: string,
  given: { version: number; source: AirSource; schedule: AirHours[] },
): Promise<AirView> {
  return inShop(deps.db, actor, async (trx) => {
    if (!(await listZones(trx, actor.shopId)).some(({ id }) => id === zoneId)) throw notFound();
    if (given.source === 'schedule' && given.schedule.length === 0)
      throw new Refusal('bad-request', { fields: [{ path: 'body.schedule', message: 'has no hours' }] });
    const schedule = given.schedule.toSorted((a, b) => a.fromHour - b.fromHour);
    if (!(await putZoneAir(trx, actor.shopId, { ...given, id: zoneId, schedule })))
      throw new Refusal('stale', { current: await airInShop(trx, actor.shopId, deps.now()) });
    await recordChange(trx, actor, {
      kind: 'air-read',
      ids: [zoneId],
      detail: { source: given.source, schedule },
    });
    return airInShop(trx, actor.shopId, deps.now());
  });
}
