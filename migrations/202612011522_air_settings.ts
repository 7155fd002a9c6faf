import type { Knex } from 'knex';

/** What the planner takes for the air of a zone, and when a reading counts. No row: the defaults of contracts/air.ts. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table air_settings (
      shop_id uuid primary key references shop (id),
      default_celsius double precision not null check (default_celsius between -20 and 60),
      default_humidity double precision not null check (default_humidity between 0 and 100),
      -- a difference above these makes a posted plan stale
      stale_celsius double precision not null check (stale_celsius between 0.5 and 20),
      stale_humidity double precision not null check (stale_humidity between 1 and 60),
      -- how long a reading counts for the gate before spraying
      fresh_minutes integer not null check (fresh_minutes between 5 and 1440),
      -- surface over dew point: a shop may ask for more than 3.0 C, never for less (ISO 8502-4 practice)
      margin_celsius double precision not null check (margin_celsius between 3 and 15),
      version integer not null default 1
    );

    create table zone_air (
      shop_id uuid not null references shop (id),
      zone_id uuid not null,
      source text not null check (source in ('default', 'latest', 'schedule')),
      -- [{fromHour, toHour, celsius, humidity}], wall clock of the shop; empty unless source is 'schedule'
      schedule jsonb not null default '[]',
      version integer not null default 1,
      primary key (shop_id, zone_id),
      foreign key (shop_id, zone_id) references zone (shop_id, id)
    );
    select fence_tenant_table(t::regclass) from unnest(array['air_settings', 'zone_air']) t;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table zone_air, air_settings');
}
