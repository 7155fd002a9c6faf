import type { Knex } from 'knex';

/** Two who change the same thing notice each other; zones that were used once stay on record when they are taken away. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table zone add column version integer not null default 1, add column retired_at timestamptz;
    alter table place add column version integer not null default 1;
    alter table circuit add column version integer not null default 1;
    alter table lamp add column version integer not null default 1;
    alter table closure add column version integer not null default 1;
    -- how the kilowatts of a circuit come about, where somebody entered it
    alter table circuit
      add column volts numeric(6, 1) check (volts > 0),
      add column phases integer check (phases in (1, 3)),
      add column breaker_amperes numeric(6, 1) check (breaker_amperes > 0);
    alter table shop
      add column version integer not null default 1,
      -- the opening hours as a whole
      add column hours_version integer not null default 1,
      -- what a new account of the shop begins with
      add column temperature_unit text not null default 'C' check (temperature_unit in ('C', 'F')),
      add column clock text not null default '24' check (clock in ('24', '12'));
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table shop drop column clock, drop column temperature_unit, drop column hours_version, drop column version;
    alter table circuit drop column breaker_amperes, drop column phases, drop column volts;
    alter table closure drop column version;
    alter table lamp drop column version;
    alter table circuit drop column version;
    alter table place drop column version;
    alter table zone drop column retired_at, drop column version;
  `);
}
