import type { LampFields } from '#contracts/lamps.ts';
import type { Trx } from './in-shop.ts';

export type LampRow = LampFields & { id: string; version: number; retired: boolean };

const columns = {
  name: 'name',
  circuitId: 'circuit_id',
  kilowatts: 'kilowatts',
  wave: 'wave',
} as const satisfies Record<keyof LampFields, string>;

const read = (trx: Trx, shopId: string) =>
  trx('lamp')
    .where({ shop_id: shopId })
    .select({ id: 'id', version: 'version', ...columns, retired: trx.raw('retired_at is not null') });

const rowOf = (fields: Partial<LampFields>): Record<string, unknown> =>
  Object.fromEntries(Object.entries(fields).map(([field, value]) => [columns[field as keyof LampFields], value]));

export const loadLamps = (trx: Trx, shopId: string): Promise<LampRow[]> =>
  read(trx, shopId).orderByRaw('retired_at is not null, position, name');

/** Takes the lamp's row, as whoever books it does, until the transaction ends. */
export async function lockLamp(trx: Trx, shopId: string, id: string): Promise<LampRow | undefined> {
  const [row] = (await read(trx, shopId).andWhere({ id }).forNoKeyUpdate()) as LampRow[];
  return row;
}

export async function insertLamp(trx: Trx, shopId: string, id: string, fields: LampFields): Promise<void> {
  await trx('lamp').insert({
    shop_id: shopId,
    id,
    ...rowOf(fields),
    position: trx('lamp').where({ shop_id: shopId }).select(trx.raw('coalesce(max(position), 0) + 1')),
  });
}

/** Fields that are given; counts the version up. */
export async function updateLamp(trx: Trx, shopId: string, id: string, fields: Partial<LampFields>): Promise<void> {
  await trx('lamp')
    .where({ shop_id: shopId, id })
    .update({ ...rowOf(fields), version: trx.raw('version + 1') });
}

export async function retireLampRow(trx: Trx, shopId: string, id: string, retiredAt: Date | null): Promise<void> {
  await trx('lamp')
    .where({ shop_id: shopId, id })
    .update({ retired_at: retiredAt, version: trx.raw('version + 1') });
}

/** Positions as the ids stand; how many of them are lamps of the shop. */
export async function setLampOrder(trx: Trx, shopId: string, ids: readonly string[]): Promise<number> {
  const answer = await trx.raw<{ rowCount: number }>(
    `update lamp set position = o.at from unnest(:ids::uuid[]) with ordinality o (id, at)
     where lamp.shop_id = :shopId and lamp.id = o.id`,
    { shopId, ids: [...ids] },
  );
  return answer.rowCount;
}
