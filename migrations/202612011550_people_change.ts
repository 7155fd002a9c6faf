import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table person add column version integer not null default 1;
    -- the last day of somebody who is leaving; retired by the daily look once it is over
    alter table person add column leaves_on date;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('alter table person drop column leaves_on, drop column version');
}
