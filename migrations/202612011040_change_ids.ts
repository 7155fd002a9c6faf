import type { Knex } from 'knex';

/** A job's page asks for the changes that name it; without this it would read the shop's whole history. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw('create index change_ids on change using gin (ids)');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop index change_ids');
}
