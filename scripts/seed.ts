/**
 * Puts the demo shop into an empty database:
 *   DATABASE_URL=postgres://... npm run seed [-- --now 2026-03-02T09:00:00Z]
 * Does nothing where anybody has an account already.
 */
import { parseArgs } from 'node:util';
import signIns from '../seeds/demo-sign-ins.json' with { type: 'json' };
import { seedDemo } from '../seeds/index.ts';

function fail(message: string): never {
  process.stderr.write(`${message}\n`);
  process.exit(1);
}

const { values } = parseArgs({ options: { now: { type: 'string' } } });
const ownerUrl = process.env['DATABASE_OWNER_URL'] || process.env['DATABASE_URL'];
if (!ownerUrl) fail('DATABASE_OWNER_URL or DATABASE_URL must name the database to put the demo shop into.');
const now = values.now === undefined ? new Date() : new Date(values.now);
if (Number.isNaN(now.getTime())) fail('--now must be an instant, such as 2026-03-02T09:00:00Z.');

if (await seedDemo(ownerUrl, now)) {
  process.stdout.write('The demo shop is in. Sign in as:\n');
  for (const { role, email, password } of signIns) process.stdout.write(`  ${role.padEnd(8)} ${email}  ${password}\n`);
} else process.stdout.write('The database is in use already: nothing was touched.\n');
