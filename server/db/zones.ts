import type { Zone } from '#contracts/places.ts';
import type { Trx } from './in-shop.ts';

const columns = { id: 'id', name: 'name', version: 'version' };

export const loadZones = (trx: Trx, shopId: string): Promise<Zone[]> =>
  trx('zone').where({ shop_id: shopId }).whereNull('retired_at').orderBy('name').select<Zone[]>(columns);

export const lockZone = (trx: Trx, shopId: string, id: string): Promise<Zone | undefined> =>
  trx('zone').where({ shop_id: shopId, id }).whereNull('retired_at').forNoKeyUpdate().first<Zone | undefined>(columns);

/** A new zone; one of that name that was taken away comes back, with its readings. Undefined where the name is in use. */
export async function putZone(trx: Trx, shopId: string, zone: { id: string; name: string }): Promise<Zone | undefined> {
  const [row] = await trx('zone')
    .insert({ shop_id: shopId, ...zone })
    .onConflict(['shop_id', 'name'])
    .merge({ retired_at: null, version: trx.raw('zone.version + 1') })
    .whereNotNull('zone.retired_at')
    .returning<Zone[]>(['id', 'name', 'version']);
  return row;
}

export async function renameZone(trx: Trx, shopId: string, id: string, name: string): Promise<void> {
  await trx('zone')
    .where({ shop_id: shopId, id })
    .update({ name, version: trx.raw('version + 1') });
}

export async function retireZone(trx: Trx, shopId: string, id: string, at: Date): Promise<void> {
  await trx('zone')
    .where({ shop_id: shopId, id })
    .update({ retired_at: at, version: trx.raw('version + 1') });
}

/** Places that are in use and stand in the zone. */
export const placesInZone = (trx: Trx, shopId: string, zoneId: string): Promise<{ id: string; name: string }[]> =>
  trx('place')
    .where({ shop_id: shopId, zone_id: zoneId })
    .whereNull('retired_at')
    .orderBy('name')
    .select<{ id: string; name: string }[]>('id', 'name');
