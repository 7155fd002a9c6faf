import { migrateLatest } from './db/migrate.ts';
import { fail } from './program.ts';

const ownerUrl = process.env['DATABASE_OWNER_URL'] || process.env['DATABASE_URL'];
if (!ownerUrl) fail('DATABASE_OWNER_URL or DATABASE_URL must name the database to bring up to date.');
try {
  await migrateLatest(ownerUrl);
} catch (error) {
  fail(`The database cannot be brought up to date: ${error instanceof Error ? error.message : String(error)}`);
}
