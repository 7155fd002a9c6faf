import knexFactory, { type Knex } from 'knex';
import { migrations } from '../../migrations/index.ts';

export const migrationSource: Knex.MigrationSource<string> = {
  getMigrations: async () => Object.keys(migrations),
  getMigrationName: (name) => name,
  getMigration: async (name) => {
    const step = migrations[name];
    if (!step) throw new Error(`Migration ${name} is in the database but not in this version of the program.`);
    return step;
  },
};

/** Brings the database of `ownerUrl` to the newest schema; does nothing when it is there already. */
export async function migrateLatest(ownerUrl: string): Promise<void> {
  const knex = knexFactory({
    client: 'pg',
    connection: ownerUrl,
    pool: { min: 0, max: 1 },
    migrations: { migrationSource },
  });
  try {
    await knex.raw(`set lock_timeout = '3s'`);
    await knex.migrate.latest();
  } finally {
    await knex.destroy();
  }
}
