import { seedDemo } from '../seeds/index.ts';
import { fail } from './program.ts';

const ownerUrl = process.env['DATABASE_OWNER_URL'] || process.env['DATABASE_URL'];
if (!ownerUrl) fail('DATABASE_OWNER_URL or DATABASE_URL must name the database to put the demo shop into.');
try {
  await seedDemo(ownerUrl, new Date());
} catch (error) {
  fail(`The demo shop cannot be put in: ${error instanceof Error ? error.message : String(error)}`);
}
