import { once } from 'node:events';
import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { createInterface } from 'node:readline';
import { hasEnded, spawnTied, stopChild } from './children.mjs';
import { Fault } from './fault.mjs';
import { root } from './places.mjs';
import { openCluster } from './postgres.mjs';

/**
 * Keeps the running parts: starts them one after the other, stops them in the opposite order, and ends everything when one of them
 * ends by itself.
 * @typedef {object} House
 * @property {(what: { name: string, ended: Promise<unknown>, stop: () => Promise<void> }) => void} keep
 * @property {(name: string, command: string[], env: Record<string, string>) => import('node:child_process').ChildProcess} spawn
 * @property {(name: string, command: string[], env: Record<string, string>) => Promise<void>} runOnce
 * @property {() => boolean} isClosing
 * @property {(code: number) => Promise<never>} close
 *
 * @returns {House}
 */
export function openHouse() {
  /** @type {{ name: string, stop: () => Promise<void> }[]} */
  const parts = [];
  let closing = false;

  /** @type {House['close']} */
  const close = async (code) => {
    if (closing) return new Promise(() => {});
    closing = true;
    for (const part of parts.reverse()) await part.stop();
    process.exit(code);
  };

  /** For a part that came up while everything else was already going down. @param {() => Promise<void>} stop */
  const stopped = (stop) => {
    void stop();
    return new Fault('Stopped.');
  };

  /** @type {House['keep']} */
  const keep = ({ name, ended, stop }) => {
    if (closing) throw stopped(stop);
    parts.push({ name, stop });
    void ended.then((how) => {
      if (closing) return;
      process.stderr.write(`${name} ended${typeof how === 'string' ? ` (${how})` : ''}; stopping everything.\n`);
      void close(1);
    });
  };

  /** @type {House['spawn']} */
  const spawn = (name, [command = '', ...args], env) => {
    const child = spawnTied(command, args, { cwd: root, env, stdio: ['ignore', 'pipe', 'inherit'] });
    keep({ name, ended: endOf(child), stop: () => stopChild(child, 'SIGTERM', 15_000) });
    return child;
  };

  /** @type {House['runOnce']} */
  const runOnce = async (name, [command = '', ...args], env) => {
    const child = spawnTied(command, args, { cwd: root, env, stdio: ['ignore', 'ignore', 'inherit'] });
    const part = { name, stop: () => stopChild(child) };
    if (closing) throw stopped(part.stop);
    parts.push(part);
    const how = await endOf(child);
    parts.splice(parts.indexOf(part), 1);
    if (child.exitCode !== 0) throw new Fault(`${name} failed (${how}); its message is above.`);
  };

  // Ctrl-C comes twice when npm passes it on; the second time changes nothing.
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => void close(0));
  return { keep, spawn, runOnce, close, isClosing: () => closing };
}

/** @param {import('node:child_process').ChildProcess} child @returns {Promise<string>} */
async function endOf(child) {
  if (!hasEnded(child)) await Promise.race([once(child, 'exit'), once(child, 'error')]).catch(() => {});
  return child.signalCode ?? `code ${child.exitCode ?? 'unknown'}`;
}

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
  for await (const line of createInterface({ input: child.stdout })) {
    if (!line.startsWith('{"ready":true')) continue;
    child.stdout.resume();
    return JSON.parse(line).port;
  }
  throw new Fault('The local mail server did not start.');
}

/**
 * Waits until the web server answers on its health address.
 * @param {string} address @param {House} house
 */
export async function untilHealthy(address, house) {
  const end = Date.now() + 60_000;
  while (!house.isClosing()) {
    const answer = await fetch(`${address}/api/health`).catch(() => undefined);
    if (answer?.status === 200) return;
    if (Date.now() > end) throw new Fault(`The web server does not become healthy at ${address}/api/health.`);
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}
