// Like start, but from the sources: server and worker start anew on each change, pages change in place.
import './lib/node-version.mjs';
import { buildServer } from './lib/build.mjs';
import { demoSignIns, isEmpty, rememberDemo } from './lib/demo.mjs';
import { loadEnv } from './lib/env-file.mjs';
import { sayFault } from './lib/fault.mjs';
import { untilHealthy, withDatabase, withMail } from './lib/house-parts.mjs';
import { openHouse } from './lib/house.mjs';
import { installPackagesOfLock } from './lib/install.mjs';
import { entries, hasEntry, inRoot } from './lib/places.mjs';
import { freePort } from './lib/ports.mjs';
import { tool } from './lib/run.mjs';
import { openDataDir, settle } from './lib/settings.mjs';

/** @param {import('./lib/places.mjs').Entry} entry */
const once = (entry) => [process.execPath, '--import', 'tsx', entries[entry]];
/** @param {import('./lib/places.mjs').Entry} entry */
const watched = (entry) => [
  process.execPath,
  tool('tsx/dist/cli.mjs'),
  'watch',
  '--clear-screen=false',
  entries[entry],
];

const house = openHouse();

async function dev() {
  loadEnv(inRoot('.env'));
  process.env['NODE_ENV'] ||= 'development';
  process.env['LOG_LEVEL'] ||= 'info';
  await installPackagesOfLock();
  // Its settings are read by the built reader, like those of start.
  await buildServer();
  const dataDir = openDataDir();
  const pages = await settle(dataDir);
  const address = `http://${pages['HOST']}:${pages['PORT']}`;
  let env = await withDatabase(house, { ...pages, PUBLIC_URL: pages['PUBLIC_URL'] || address }, dataDir);
  const ownerUrl = env['DATABASE_OWNER_URL'] ?? '';
  await house.runOnce('Bringing the database up to date', once('migrate'), env);
  if (hasEntry('seed') && (await isEmpty(ownerUrl))) {
    process.stdout.write('Putting in the demo shop ...\n');
    await house.runOnce('Putting in the demo shop', once('seed'), env);
    rememberDemo(dataDir, ownerUrl);
  }
  env = await withMail(house, once('local-mail'), env, dataDir);
  const host = env['HOST'];
  const api = { ...env, PORT: String(await freePort()) };
  const apiAddress = `http://${host}:${api['PORT']}`;
  house.spawn('The worker', watched('worker'), api).stdout?.pipe(process.stdout);
  house.spawn('The web server', watched('web'), api).stdout?.pipe(process.stdout);
  await untilHealthy(apiAddress, house);
  const vite = [process.execPath, tool('vite/bin/vite.js'), '--clearScreen', 'false'];
  house.spawn('Vite', vite, { ...pages, OVENBIRD_API: apiAddress }).stdout?.pipe(process.stdout);
  process.stdout.write([`Ovenbird, from the sources: ${address}`, ...demoSignIns(dataDir, ownerUrl), ''].join('\n'));
}

await dev().catch((error) => {
  if (house.isClosing()) return;
  sayFault(error);
  return house.close(1);
});
