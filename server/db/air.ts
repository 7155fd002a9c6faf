import {
  defaultAirSettings,
  type AirFigures,
  type AirHours,
  type AirSettings,
  type AirSource,
} from '#contracts/air.ts';
import type { Trx } from './in-shop.ts';
import type { ReadingOfZone } from './air-readings.ts';

export type ZoneAirFacts = {
  id: string;
  name: string;
  /** Names of the places in it, as they are shown. */
  places: string[];
  source: AirSource;
  schedule: AirHours[];
  /** 0: never set. */
  version: number;
  latest: ReadingOfZone | null;
};
/** The air that a plan was made with: what was expected, by hour or all day, and what was read then, by zone. */
export type PlanAir = { zones: Record<string, { hours: AirFigures[]; reading: AirFigures | null }> };

/** What is known of a shop's air. */
export type AirOfShop = { settings: AirSettings; zones: ZoneAirFacts[] };

type Row = {
  settings: AirSettings | null;
  zones: (Omit<ZoneAirFacts, 'latest'> & { latest: (Omit<ReadingOfZone, 'at'> & { at: string }) | null })[];
};

/** Settings and, by zone, its source and latest reading, in one statement. */
export async function loadAir(trx: Trx, shopId: string): Promise<AirOfShop> {
  const { rows } = await trx.raw<{ rows: Row[] }>(AIR, { shopId });
  const row = rows[0];
  return {
    settings: row?.settings ?? defaultAirSettings,
    zones: (row?.zones ?? []).map((zone) => ({
      ...zone,
      latest: zone.latest && { ...zone.latest, at: new Date(zone.latest.at) },
    })),
  };
}

const AIR = `
  select
    (select json_build_object('version', version, 'defaultCelsius', default_celsius, 'defaultHumidity', default_humidity,
        'staleCelsius', stale_celsius, 'staleHumidity', stale_humidity, 'freshMinutes', fresh_minutes,
        'marginCelsius', margin_celsius)
      from air_settings where shop_id = :shopId) as settings,
    (select coalesce(json_agg(json_build_object('id', z.id, 'name', z.name,
        'places', coalesce((select json_agg(p.name order by p.position, p.name) from place p
                            where p.shop_id = z.shop_id and p.zone_id = z.id and p.retired_at is null), '[]'),
        'source', coalesce(a.source, 'default'), 'schedule', coalesce(a.schedule, '[]'), 'version', coalesce(a.version, 0),
        'latest', last.reading) order by z.name), '[]')
      from zone z
      left join zone_air a on a.shop_id = z.shop_id and a.zone_id = z.id
      left join lateral (
        select json_build_object('id', r.id, 'at', r.at, 'celsius', r.celsius, 'humidity', r.humidity,
            'surfaceCelsius', r.surface_celsius, 'source', r.source) as reading
        from air_reading r where r.shop_id = z.shop_id and r.zone_id = z.id order by r.at desc, r.id desc limit 1
      ) last on true
      where z.shop_id = :shopId) as zones`;

/** Writes them where they still have the version that was seen; false where they have not. */
export async function putAirSettings(trx: Trx, shopId: string, settings: AirSettings): Promise<boolean> {
  const row = {
    default_celsius: settings.defaultCelsius,
    default_humidity: settings.defaultHumidity,
    stale_celsius: settings.staleCelsius,
    stale_humidity: settings.staleHumidity,
    fresh_minutes: settings.freshMinutes,
    margin_celsius: settings.marginCelsius,
    version: settings.version + 1,
  };
  if (settings.version === 0) {
    const made = await trx('air_settings')
      .insert({ shop_id: shopId, ...row })
      .onConflict('shop_id')
      .ignore()
      .returning('version');
    return made.length === 1;
  }
  return (await trx('air_settings').where({ shop_id: shopId, version: settings.version }).update(row)) === 1;
}

/** As `putAirSettings`, for one zone. */
export async function putZoneAir(
  trx: Trx,
  shopId: string,
  zone: Pick<ZoneAirFacts, 'id' | 'source' | 'schedule' | 'version'>,
): Promise<boolean> {
  const row = { source: zone.source, schedule: JSON.stringify(zone.schedule), version: zone.version + 1 };
  const key = { shop_id: shopId, zone_id: zone.id };
  if (zone.version === 0) {
    const made = await trx('zone_air')
      .insert({ ...key, ...row })
      .onConflict(['shop_id', 'zone_id'])
      .ignore()
      .returning('version');
    return made.length === 1;
  }
  return (
    (await trx('zone_air')
      .where({ ...key, version: zone.version })
      .update(row)) === 1
  );
}

/** The shop's zones by id and name. */
export const listZones = (trx: Trx, shopId: string): Promise<{ id: string; name: string }[]> =>
  trx('zone').where({ shop_id: shopId }).orderBy('name').select<{ id: string; name: string }[]>('id', 'name');
