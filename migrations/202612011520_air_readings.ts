import type { Knex } from 'knex';

/**
 * Air as it was read, per zone. Partitioned by month because it only grows; readings from before the first month, which come
 * by CSV, go into the default partition. A partitioned table can hold no unique (shop_id, id) without `at`: that a
 * sender's id is there once is looked up under the shop's row lock (db/air-readings.ts), by the index on (shop_id, id).
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table air_reading (
      shop_id uuid not null references shop (id),
      at timestamptz not null,
      -- made by whoever sends it, so that sending twice writes once
      id uuid not null,
      zone_id uuid not null,
      celsius double precision not null check (celsius between -20 and 60),
      humidity double precision not null check (humidity between 0 and 100),
      -- of the part or the panel to be sprayed, where somebody measured it
      surface_celsius double precision check (surface_celsius between -20 and 120),
      source text not null check (source in ('hand', 'csv', 'key')),
      primary key (shop_id, at, id),
      foreign key (shop_id, zone_id) references zone (shop_id, id)
    ) partition by range (at);
    create table air_reading_other partition of air_reading default;
    create index air_reading_id on air_reading (shop_id, id);
    create index air_reading_zone on air_reading (shop_id, zone_id, at);

    -- Makes the partitions of this month and the months ahead; safe to call again.
    create function make_air_partitions(months_ahead integer) returns void
      language plpgsql security definer set search_path = public, pg_temp as $$
    declare
      first date;
      part text;
    begin
      for i in 0..months_ahead loop
        first := date_trunc('month', now() at time zone 'utc')::date + make_interval(months => i);
        part := format('air_reading_%s', to_char(first, 'YYYYMM'));
        if to_regclass(part) is null then
          execute format('create table %I partition of air_reading for values from (%L) to (%L)',
            part, first::text || 'T00:00:00Z', (first + interval '1 month')::date::text || 'T00:00:00Z');
          execute format('alter table %I enable row level security', part);
          execute format('alter table %I force row level security', part);
        end if;
      end loop;
    end $$;
    revoke execute on function make_air_partitions(integer) from public;
    grant execute on function make_air_partitions(integer) to ovenbird_app;

    select fence_tenant_table('air_reading');
    revoke update, delete on air_reading from ovenbird_app;
    alter table air_reading_other enable row level security;
    alter table air_reading_other force row level security;
    select make_air_partitions(3);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table air_reading; drop function make_air_partitions(integer)');
}
