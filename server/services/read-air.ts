import type { AirView, Reading, ZoneAir } from '#contracts/air.ts';
import { loadAir, type AirOfShop, type ZoneAirFacts } from '../db/air.ts';
import type { ReadingOfZone } from '../db/air-readings.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { loadTimeZone } from '../db/shop-zone.ts';
import type { Deps } from '../deps.ts';
import { airAt, expectedHours, hourOf } from '../planning/air/expected-air.ts';
import { gateOf } from '../planning/air/gate.ts';
import type { Actor } from '../policies.ts';

export const readAir = (deps: Deps, actor: Actor): Promise<AirView> =>
  inShop(deps.db, actor, (trx) => airInShop(trx, actor.shopId, deps.now()));

/** The shop's air, inside the caller's transaction. */
export async function airInShop(trx: Trx, shopId: string, now: Date): Promise<AirView> {
  const [air, timeZone] = [await loadAir(trx, shopId), await loadTimeZone(trx, shopId)];
  return {
    serverTime: now.toISOString(),
    settings: air.settings,
    zones: air.zones.map((zone) => zoneView(zone, air, { now, hour: hourOf(now, timeZone) })),
  };
}

function zoneView(zone: ZoneAirFacts, { settings }: AirOfShop, { now, hour }: { now: Date; hour: number }): ZoneAir {
  return {
    ...zone,
    latest: zone.latest && readingView(zone.latest),
    gate: zone.latest && gateOf(zone.latest, settings, now),
    expected: airAt(expectedHours(zone, settings, now), hour),
  };
}

export const readingView = (reading: ReadingOfZone): Reading => ({ ...reading, at: reading.at.toISOString() });
