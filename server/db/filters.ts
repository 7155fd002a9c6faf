import type { FilterFields } from '#contracts/upkeep.ts';
import type { Trx } from './in-shop.ts';

export type FilterRow = FilterFields & { id: string; version: number; retired: boolean };
export type EntryRow = {
  id: string;
  filterId: string;
  kind: 'change' | 'pressure';
  at: Date;
  pascals: number | null;
  note: string;
  by: string | null;
};

const columns = {
  placeId: 'place_id',
  name: 'name',
  changeAfterHours: 'change_after_hours',
  changeAfterDays: 'change_after_days',
  pascalLimit: 'pascal_limit',
  efficiencyPercent: 'efficiency_percent',
} as const satisfies Record<keyof FilterFields, string>;

const rowOf = (fields: Partial<FilterFields>): Record<string, unknown> =>
  Object.fromEntries(Object.entries(fields).map(([field, value]) => [columns[field as keyof FilterFields], value]));

const read = (trx: Trx, shopId: string) =>
  trx('filter')
    .where({ shop_id: shopId })
    .select({ id: 'id', version: 'version', ...columns, retired: trx.raw('retired_at is not null') });

export const loadFilters = (trx: Trx, shopId: string): Promise<FilterRow[]> =>
  read(trx, shopId).orderByRaw('retired_at is not null, name, id');

export async function lockFilter(trx: Trx, shopId: string, id: string): Promise<FilterRow | undefined> {
  const [row] = (await read(trx, shopId).andWhere({ id }).forUpdate()) as FilterRow[];
  return row;
}

export async function insertFilter(trx: Trx, shopId: string, id: string, fields: FilterFields): Promise<void> {
  await trx('filter').insert({ shop_id: shopId, id, ...rowOf(fields) });
}

/** Fields that are given; counts the version up. */
export async function updateFilter(
  trx: Trx,
  shopId: string,
  id: string,
  { retiredAt, ...fields }: Partial<FilterFields> & { retiredAt?: Date | null },
): Promise<void> {
  await trx('filter')
    .where({ shop_id: shopId, id })
    .update({
      ...rowOf(fields),
      ...(retiredAt === undefined ? {} : { retired_at: retiredAt }),
      version: trx.raw('version + 1'),
    });
}

/** The newest entries of each filter, newest first. */
export async function loadEntries(trx: Trx, shopId: string, most: number): Promise<EntryRow[]> {
  const { rows } = await trx.raw<{ rows: EntryRow[] }>(
    `select e.id, e.filter_id as "filterId", e.kind, e.at, e.pascals, e.note, account.name as by
     from filter f
     cross join lateral (
       select * from filter_entry where shop_id = f.shop_id and filter_id = f.id order by at desc, id desc limit :most
     ) e
     left join account on account.id = e.account_id
     where f.shop_id = :shopId
     order by e.at desc, e.id desc`,
    { shopId, most },
  );
  return rows;
}

/** The last change of each filter, however long ago. */
export async function lastChanges(trx: Trx, shopId: string): Promise<Map<string, Date>> {
  const rows = await trx('filter_entry')
    .where({ shop_id: shopId, kind: 'change' })
    .groupBy('filter_id')
    .select<{ filterId: string; at: Date }[]>({ filterId: 'filter_id' }, trx.raw('max(at) as at'));
  return new Map(rows.map(({ filterId, at }) => [filterId, at]));
}

/** @returns false where an entry with that id is there already */
export async function insertEntry(
  trx: Trx,
  shopId: string,
  entry: Omit<EntryRow, 'by'> & { accountId: string },
): Promise<boolean> {
  const inserted = await trx('filter_entry')
    .insert({
      shop_id: shopId,
      id: entry.id,
      filter_id: entry.filterId,
      kind: entry.kind,
      at: entry.at,
      pascals: entry.pascals,
      note: entry.note,
      account_id: entry.accountId,
    })
    .onConflict(['shop_id', 'id'])
    .ignore()
    .returning('id');
  return inserted.length > 0;
}

export const deleteEntry = (trx: Trx, shopId: string, filterId: string, id: string): Promise<number> =>
  trx('filter_entry').where({ shop_id: shopId, filter_id: filterId, id }).delete();

const SPRAY_MINUTES = `
  with run as (
    select b.place_id, b.load_id, coalesce(s.started_at, lower(b.during)) as at,
      (select coalesce(sum((b.phases -> (p.n::int - 1) ->> 1)::int - (b.phases -> (p.n::int - 1) ->> 0)::int), 0)
        from jsonb_array_elements(s.ways) w
        cross join lateral jsonb_array_elements(w -> 'phases') with ordinality p (phase, n)
        where w ->> 'id' = b.way and p.phase ->> 'kind' = 'spray') as minutes
    from booking b join stage s on s.shop_id = b.shop_id and s.id = b.stage_id
    where b.shop_id = :shopId and b.state = 'done'
  ), shared as (
    -- stages of one load are sprayed in one go
    select place_id, load_id, min(at) as at, max(minutes) as minutes from run where minutes > 0 group by place_id, load_id
  )
  select f.id as "filterId",
    coalesce(sum(r.minutes) filter (where r.at >= f.since), 0)::int as "sinceChange",
    coalesce(sum(r.minutes) filter (where r.at >= :paceFrom), 0)::int as "sincePace"
  from (
    select filter.id, filter.place_id,
      (select max(at) from filter_entry e
        where e.shop_id = filter.shop_id and e.filter_id = filter.id and e.kind = 'change') as since
    from filter where filter.shop_id = :shopId
  ) f left join shared r on r.place_id = f.place_id
  group by f.id`;

export type SprayMinutes = { sinceChange: number; sincePace: number };

/**
 * Minutes of spraying in each filter's place: since its last change, and since `paceFrom`. Counted from finished
 * bookings as they were planned; who shared a booth run is counted once.
 */
export async function sprayMinutes(trx: Trx, shopId: string, paceFrom: Date): Promise<Map<string, SprayMinutes>> {
  const { rows } = await trx.raw<{ rows: (SprayMinutes & { filterId: string })[] }>(SPRAY_MINUTES, {
    shopId,
    paceFrom,
  });
  return new Map(rows.map(({ filterId, ...minutes }) => [filterId, minutes]));
}
