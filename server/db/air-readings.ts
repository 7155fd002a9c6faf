import type { Reading } from '#contracts/air.ts';
import type { Trx } from './in-shop.ts';

/** Temperature and surface in C, relative humidity in %. */
export type ReadingRow = {
  id: string;
  zoneId: string;
  at: Date;
  celsius: number;
  humidity: number;
  surfaceCelsius: number | null;
  source: Reading['source'];
};
export type ReadingOfZone = Omit<ReadingRow, 'zoneId'>;

const columns = {
  id: 'id',
  zoneId: 'zone_id',
  at: 'at',
  celsius: 'celsius',
  humidity: 'humidity',
  surfaceCelsius: 'surface_celsius',
  source: 'source',
} as const;

/**
 * Those of these ids that are there already, whatever their moment. A partitioned table cannot keep an id unique without its
 * partition key, so writers hold the shop's row (db/locks.ts) while they look here and write.
 */
export const readingsById = (trx: Trx, shopId: string, ids: readonly string[]): Promise<ReadingRow[]> =>
  trx('air_reading').where({ shop_id: shopId }).whereIn('id', ids).select<ReadingRow[]>(columns);

export async function insertReadings(trx: Trx, shopId: string, readings: readonly ReadingRow[]): Promise<void> {
  const rows = readings.map(({ id, zoneId, at, celsius, humidity, surfaceCelsius, source }) => ({
    shop_id: shopId,
    id,
    zone_id: zoneId,
    at,
    celsius,
    humidity,
    surface_celsius: surfaceCelsius,
    source,
  }));
  await trx.batchInsert('air_reading', rows, 500);
}

/** How many slices a long span is cut into; of each the coldest, warmest, driest and dampest reading is kept. */
const SLICES = 150;

/**
 * Readings of a zone from `from` to before `to`, oldest first. Above `most` only real readings are left, those with the
 * extremes of each slice of the span: at most 600.
 */
export async function readingsOfZone(
  trx: Trx,
  shopId: string,
  asked: { zoneId: string; from: Date; to: Date; most: number },
): Promise<{ total: number; readings: ReadingOfZone[] }> {
  const { rows } = await trx.raw<{ rows: (ReadingOfZone & { total: number })[] }>(
    `with span as materialized (
       select id, at, celsius, humidity, surface_celsius, source, count(*) over () as total,
              width_bucket(extract(epoch from at)::float8, extract(epoch from :from::timestamptz)::float8,
                           extract(epoch from :to::timestamptz)::float8, :slices) as slice
       from air_reading
       where shop_id = :shopId and zone_id = :zoneId and at >= :from and at < :to
     ), ranked as (
       select *, row_number() over (partition by slice order by celsius, id) as coldest,
              row_number() over (partition by slice order by celsius desc, id) as warmest,
              row_number() over (partition by slice order by humidity, id) as driest,
              row_number() over (partition by slice order by humidity desc, id) as dampest
       from span
     )
     select id, at, celsius, humidity, surface_celsius as "surfaceCelsius", source, total::int as total
     from ranked
     where total <= :most or 1 in (coldest, warmest, driest, dampest)
     order by at, id`,
    { shopId, slices: SLICES, ...asked },
  );
  return { total: rows[0]?.total ?? 0, readings: rows.map(({ total: _total, ...reading }) => reading) };
}

export type NamedReading = ReadingOfZone & { zone: string };

/** The newest since a moment with their zones' names, oldest first. */
export async function newestReadings(
  trx: Trx,
  shopId: string,
  { from, most }: { from: Date; most: number },
): Promise<NamedReading[]> {
  const newest = await trx('air_reading')
    .join('zone', (on) => on.on('zone.shop_id', 'air_reading.shop_id').andOn('zone.id', 'air_reading.zone_id'))
    .where({ 'air_reading.shop_id': shopId })
    .andWhere('at', '>=', from)
    .orderBy([
      { column: 'at', order: 'desc' },
      { column: 'air_reading.id', order: 'desc' },
    ])
    .limit(most)
    .select<NamedReading[]>({
      id: 'air_reading.id',
      zone: 'zone.name',
      at: 'at',
      celsius: 'celsius',
      humidity: 'humidity',
      surfaceCelsius: 'surface_celsius',
      source: 'source',
    });
  return newest.reverse();
}
