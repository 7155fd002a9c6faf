import { randomBytes } from 'node:crypto';
import { accessSync, constants, existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { Fault } from './fault.mjs';
import { builtEntry, inRoot } from './places.mjs';
import { freePort, isFree } from './ports.mjs';

/** @typedef {Record<string, string>} Settings what the server's processes get in their environment */

/** @param {string} dataDir */
function keptSecret(dataDir) {
  const file = path.join(dataDir, 'secret');
  if (!existsSync(file)) writeFileSync(file, `${randomBytes(32).toString('hex')}\n`, { mode: 0o600 });
  return readFileSync(file, 'utf8').trim();
}

/** @returns {string} the folder of everything kept here, made if need be; others may pass through to what is theirs in it */
export function openDataDir() {
  const dataDir = path.resolve(inRoot(), process.env['DATA_DIR'] || '.data');
  try {
    mkdirSync(dataDir, { recursive: true, mode: 0o711 });
    accessSync(dataDir, constants.R_OK | constants.W_OK);
  } catch (error) {
    const why = /** @type {Error} */ (error).message;
    throw new Fault(
      `The data folder ${dataDir} cannot be used (${why}). Start as the user it belongs to, or set DATA_DIR.`,
    );
  }
  return dataDir;
}

/**
 * The environment's settings with the house's own for what it leaves open, checked by the server's own reader before
 * anything starts.
 * @param {string} dataDir
 * @returns {Promise<Settings>}
 * @throws {Fault} naming every setting that is wrong, or the port that is taken
 */
export async function settle(dataDir) {
  const env = /** @type {Settings} */ ({ ...process.env });
  const given = (/** @type {string} */ name, /** @type {string} */ otherwise) => env[name] || otherwise;
  env['NODE_ENV'] = given('NODE_ENV', 'production');
  env['HOST'] = given('HOST', '127.0.0.1');
  env['PORT'] = given('PORT', '5180');
  env['DATA_DIR'] = dataDir;
  env['FILES_DIR'] = given('FILES_DIR', path.join(dataDir, 'files'));
  env['WEB_ROOT'] = given('WEB_ROOT', inRoot('dist/web'));
  // Each request in the log is for those who ask for it; at a terminal it would bury the address.
  env['LOG_LEVEL'] = given('LOG_LEVEL', 'warn');
  env['SESSION_SECRET'] = given('SESSION_SECRET', keptSecret(dataDir));
  await check({ ...env, DATABASE_URL: given('DATABASE_URL', 'postgres://127.0.0.1/own') });
  if (env['PORT'] === '0') env['PORT'] = String(await freePort());
  if (!(await isFree(Number(env['PORT']), env['HOST']))) {
    throw new Fault(
      `Port ${env['PORT']} of ${env['HOST']} is taken. Stop the program that uses it, or set PORT to another one.`,
    );
  }
  return env;
}

/** @param {Settings} env */
async function check(env) {
  const { readConfig, ConfigFault } = await import(pathToFileURL(builtEntry('config')).href);
  try {
    readConfig(env);
  } catch (error) {
    throw error instanceof ConfigFault ? new Fault(/** @type {Error} */ (error).message) : error;
  }
}
