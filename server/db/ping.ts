import type { Knex } from 'knex';

/** Resolves when the database answers. */
export async function ping(db: Knex): Promise<void> {
  await db.raw('select 1');
}
