import type { PlaceFields } from '#contracts/places.ts';
import type { Trx } from './in-shop.ts';

export type PlaceRow = PlaceFields & { id: string; version: number; retired: boolean };

const columns = {
  kind: 'kind',
  name: 'name',
  zoneId: 'zone_id',
  units: 'units',
  bakes: 'bakes',
  bakeLimitCelsius: 'bake_limit_celsius',
  volumeM3: 'volume_m3',
  airFlowM3PerHour: 'air_flow_m3_per_hour',
  clearanceMinutes: 'clearance_minutes',
} as const satisfies Record<keyof PlaceFields, string>;

const read = (trx: Trx, shopId: string) =>
  trx('place')
    .where({ shop_id: shopId })
    .select({ id: 'id', version: 'version', ...columns, retired: trx.raw('retired_at is not null') });

const rowOf = (fields: Partial<PlaceFields>): Record<string, unknown> =>
  Object.fromEntries(Object.entries(fields).map(([field, value]) => [columns[field as keyof PlaceFields], value]));

/** In the order in which rows stand; what is retired comes last. */
export const loadPlaces = (trx: Trx, shopId: string): Promise<PlaceRow[]> =>
  read(trx, shopId).orderByRaw('retired_at is not null, position, name');

/** Takes the place's row, as whoever books it does, until the transaction ends. */
export async function lockPlace(trx: Trx, shopId: string, id: string): Promise<PlaceRow | undefined> {
  const [row] = (await read(trx, shopId).andWhere({ id }).forNoKeyUpdate()) as PlaceRow[];
  return row;
}

/** At the end of the list. */
export async function insertPlace(trx: Trx, shopId: string, id: string, fields: PlaceFields): Promise<void> {
  await trx('place').insert({
    shop_id: shopId,
    id,
    ...rowOf(fields),
    position: trx('place').where({ shop_id: shopId }).select(trx.raw('coalesce(max(position), 0) + 1')),
  });
}

/** Fields that are given; counts the version up. */
export async function updatePlace(trx: Trx, shopId: string, id: string, fields: Partial<PlaceFields>): Promise<void> {
  await trx('place')
    .where({ shop_id: shopId, id })
    .update({ ...rowOf(fields), version: trx.raw('version + 1') });
}

export async function retirePlaceRow(trx: Trx, shopId: string, id: string, retiredAt: Date | null): Promise<void> {
  await trx('place')
    .where({ shop_id: shopId, id })
    .update({ retired_at: retiredAt, version: trx.raw('version + 1') });
}

/** Positions as the ids stand; how many of them are places of the shop. */
export async function setPlaceOrder(trx: Trx, shopId: string, ids: readonly string[]): Promise<number> {
  const answer = await trx.raw<{ rowCount: number }>(
    `update place set position = o.at from unnest(:ids::uuid[]) with ordinality o (id, at)
     where place.shop_id = :shopId and place.id = o.id`,
    { shopId, ids: [...ids] },
  );
  return answer.rowCount;
}
