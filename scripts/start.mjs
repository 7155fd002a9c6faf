// Starts everything that is missing around the server, from nothing, and stops it all in order on Ctrl-C or SIGTERM.
import './lib/node-version.mjs';
import { demoSignIns, isEmpty, rememberDemo } from './lib/demo.mjs';
import { loadEnv } from './lib/env-file.mjs';
import { sayFault } from './lib/fault.mjs';
import { untilHealthy, withDatabase, withMail } from './lib/house-parts.mjs';
import { openHouse } from './lib/house.mjs';
import { builtEntry, hasEntry, inRoot } from './lib/places.mjs';
import { openDataDir, settle } from './lib/settings.mjs';

/** @param {import('./lib/places.mjs').Entry} entry */
const command = (entry) => [process.execPath, '--enable-source-maps', builtEntry(entry)];

const house = openHouse();

async function start() {
  loadEnv(inRoot('.env'));
  const dataDir = openDataDir();
  let env = await settle(dataDir);
  env = await withDatabase(house, env, dataDir);
  const ownerUrl = env['DATABASE_OWNER_URL'] ?? '';
  await house.runOnce('Bringing the database up to date', command('migrate'), env);
  if (hasEntry('seed') && (await isEmpty(ownerUrl))) {
    process.stdout.write('Putting in the demo shop ...\n');
    await house.runOnce('Putting in the demo shop', command('seed'), env);
    rememberDemo(dataDir, ownerUrl);
  }
  env = await withMail(house, command('local-mail'), env, dataDir);
  house.spawn('The worker', command('worker'), env).stdout?.pipe(process.stdout);
  house.spawn('The web server', command('web'), env).stdout?.pipe(process.stdout);
  const host = env['HOST'] === '0.0.0.0' || env['HOST'] === '::' ? '127.0.0.1' : env['HOST'];
  const address = `http://${host}:${env['PORT']}`;
  await untilHealthy(address, house);
  const lines = [`Ovenbird is ready: ${env['PUBLIC_URL'] || address}`, ...demoSignIns(dataDir, ownerUrl)];
  if (env['DEV_MAILBOX_DIR'])
    lines.push(`Letters are kept in ${env['DEV_MAILBOX_DIR']} and not sent on (SMTP_URL is not set).`);
  if (!house.isClosing()) process.stdout.write(`${lines.join('\n')}\nCtrl-C stops everything.\n`);
}

await start().catch((error) => {
  // A part that was stopped half way up is no fault.
  if (house.isClosing()) return;
  sayFault(error);
  return house.close(1);
});
