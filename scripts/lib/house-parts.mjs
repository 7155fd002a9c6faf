import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { createInterface } from 'node:readline';
import { Fault } from './fault.mjs';
import { openCluster } from './postgres.mjs';

/** @typedef {import('./house.mjs').House} House */

/**
 * The database server given by DATABASE_URL, or else one of our own whose data stay in the data folder.
 * @param {House} house @param {Record<string, string>} env @param {string} dataDir
 * @returns {Promise<Record<string, string>>} `env` with both addresses of the database
 */
export async function withDatabase(house, env, dataDir) {
  if (env['DATABASE_URL']) {
    const given = { ...env, DATABASE_OWNER_URL: env['DATABASE_OWNER_URL'] || env['DATABASE_URL'] };
    await askOnce(given.DATABASE_OWNER_URL);
    return given;
  }
  const folder = path.join(dataDir, 'postgres');
  const cluster = await openCluster({ folder, durable: true, database: 'ovenbird' });
  if (cluster.folder !== folder) {
    process.stdout.write(`The user postgres cannot reach ${folder}: the database is kept in ${cluster.folder}.\n`);
  }
  house.keep({ name: 'The database server', ended: cluster.ended, stop: cluster.stop });
  const url = cluster.url('ovenbird');
  return { ...env, DATABASE_URL: url, DATABASE_OWNER_URL: url };
}

/** @param {string} url @throws {Fault} when the database does not answer */
async function askOnce(url) {
  const { default: pg } = await import('pg');
  const client = new pg.Client({ connectionString: url, connectionTimeoutMillis: 10_000 });
  try {
    await client.connect();
    await client.end();
  } catch (error) {
    const { host, pathname } = new URL(url);
    throw new Fault(
      `The database ${host}${pathname} of DATABASE_URL cannot be used: ${/** @type {Error} */ (error).message}`,
    );
  }
}

/**
 * The mail server given by SMTP_URL, or else a local one that keeps every letter in a folder and sends none on.
 * @param {House} house @param {string[]} command @param {Record<string, string>} env @param {string} dataDir
 */
export async function withMail(house, command, env, dataDir) {
  if (env['SMTP_URL']) return env;
  const mailbox = path.join(dataDir, 'mail');
  mkdirSync(mailbox, { recursive: true, mode: 0o700 });
  const settings = { ...env, DEV_MAILBOX_DIR: mailbox, LOCAL_MAIL_PORT: env['LOCAL_MAIL_PORT'] || '0' };
  const child = house.spawn('The local mail server', command, settings);
  const port = await readyPort(child);
  return { ...settings, SMTP_URL: `smtp://127.0.0.1:${port}` };
}

/** @param {import('node:child_process').ChildProcess} child that prints {"ready":true,"port":N} @returns {Promise<number>} */
async function readyPort(child) {
  if (!child.stdout) throw new Error('no output to read');
  /** @type {number | undefined} */
  let port;
  for await (const line of createInterface({ input: child.stdout })) {
    if (!line.startsWith('{"ready":true')) continue;
    port = JSON.parse(line).port;
    break;
  }
  // Leaving the loop pauses the stream, and a full pipe would stop the server at its next words.
  child.stdout.resume();
  if (port !== undefined) return port;
  throw new Fault('The local mail server did not start.');
}

/**
 * Waits until the web server answers on its health address.
 * @param {string} address @param {House} house
 */
export async function untilHealthy(address, house) {
  const end = Date.now() + 180_000;
  while (!house.isClosing()) {
    const answer = await fetch(`${address}/api/health`).catch(() => undefined);
    if (answer?.status === 200) return;
    if (Date.now() > end) throw new Fault(`The web server does not become healthy at ${address}/api/health.`);
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}
