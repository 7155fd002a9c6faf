import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    -- Air that is shared: what is sprayed in one place of a zone is in the air of the others.
    create table zone (
      shop_id uuid not null references shop (id),
      id uuid not null,
      name text not null check (length(name) between 1 and 80),
      primary key (shop_id, id),
      unique (shop_id, name)
    );

    create table place (
      shop_id uuid not null references shop (id),
      id uuid not null,
      kind text not null check (kind in ('booth', 'prep', 'rack')),
      name text not null check (length(name) between 1 and 80),
      zone_id uuid,
      units integer not null check (units between 1 and 1000),
      bakes boolean not null default false,
      -- highest air temperature the booth may bake at
      bake_limit_celsius numeric(5, 2) check (bake_limit_celsius between 20 and 100),
      volume_m3 numeric(8, 2) check (volume_m3 > 0),
      air_flow_m3_per_hour numeric(9, 2) check (air_flow_m3_per_hour > 0),
      -- measured minutes until nobody needs air-fed breathing equipment after spraying
      clearance_minutes integer not null default 0 check (clearance_minutes between 0 and 240),
      position integer not null default 0,
      retired_at timestamptz,
      primary key (shop_id, id),
      unique (shop_id, name),
      foreign key (shop_id, zone_id) references zone (shop_id, id)
    );
    create index place_zone on place (shop_id, zone_id);

    create table circuit (
      shop_id uuid not null references shop (id),
      id uuid not null,
      name text not null check (length(name) between 1 and 80),
      kilowatts numeric(7, 2) not null check (kilowatts > 0),
      primary key (shop_id, id),
      unique (shop_id, name)
    );

    create table lamp (
      shop_id uuid not null references shop (id),
      id uuid not null,
      name text not null check (length(name) between 1 and 80),
      circuit_id uuid not null,
      kilowatts numeric(7, 2) not null check (kilowatts > 0),
      wave text not null default 'short' check (wave in ('short', 'medium')),
      position integer not null default 0,
      retired_at timestamptz,
      primary key (shop_id, id),
      unique (shop_id, name),
      foreign key (shop_id, circuit_id) references circuit (shop_id, id)
    );
    create index lamp_circuit on lamp (shop_id, circuit_id);

    -- Opening hours: local wall time plus a recurrence rule (RFC 5545), expanded in the shop's zone when read.
    create table opening (
      shop_id uuid not null references shop (id),
      id uuid not null,
      starts_local text not null check (starts_local ~ '^\\d{4}-\\d\\d-\\d\\dT\\d\\d:\\d\\d$'),
      rule text,
      minutes integer not null check (minutes between 1 and 1440),
      primary key (shop_id, id)
    );

    -- Time in which a place, a lamp or (where neither is named) the whole shop is not used.
    create table closure (
      shop_id uuid not null references shop (id),
      id uuid not null,
      kind text not null check (kind in ('holiday', 'closure', 'maintenance', 'breakdown')),
      label text not null default '',
      place_id uuid,
      lamp_id uuid,
      starts_local text not null check (starts_local ~ '^\\d{4}-\\d\\d-\\d\\dT\\d\\d:\\d\\d$'),
      rule text,
      minutes integer not null check (minutes between 1 and 525600),
      primary key (shop_id, id),
      foreign key (shop_id, place_id) references place (shop_id, id),
      foreign key (shop_id, lamp_id) references lamp (shop_id, id),
      check (num_nonnulls(place_id, lamp_id) <= 1)
    );
    create index closure_place on closure (shop_id, place_id);
    create index closure_lamp on closure (shop_id, lamp_id);

    select fence_tenant_table(t::regclass) from unnest(array['zone', 'place', 'circuit', 'lamp', 'opening', 'closure']) t;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table closure, opening, lamp, circuit, place, zone');
}
