import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { inRoot } from './places.mjs';

/** @param {string} dataDir */
const mark = (dataDir) => path.join(dataDir, 'demo');

/**
 * Whether nobody has an account yet: only then may the demo shop be put in.
 * @param {string} ownerUrl
 */
export async function isEmpty(ownerUrl) {
  const { default: pg } = await import('pg');
  const client = new pg.Client({ connectionString: ownerUrl });
  await client.connect();
  try {
    const { rows } = await client.query('select not exists (select from account) as empty');
    return rows[0].empty === true;
  } finally {
    await client.end();
  }
}

/** Remembers which database holds the demo shop. @param {string} dataDir @param {string} ownerUrl */
export function rememberDemo(dataDir, ownerUrl) {
  writeFileSync(mark(dataDir), `${databaseName(ownerUrl)}\n`);
}

/** @param {string} url without the password, which may change */
function databaseName(url) {
  const { hostname, pathname } = new URL(url);
  return `${hostname}${pathname}`;
}

/**
 * Lines with the demo's sign-ins, none when the database is not the demo's.
 * @param {string} dataDir @param {string} ownerUrl
 * @returns {string[]}
 */
export function demoSignIns(dataDir, ownerUrl) {
  const file = inRoot('seeds/demo-sign-ins.json');
  if (!existsSync(file) || !existsSync(mark(dataDir))) return [];
  if (readFileSync(mark(dataDir), 'utf8').trim() !== databaseName(ownerUrl)) return [];
  /** @type {{ role: string, email: string, password: string }[]} */
  const signIns = JSON.parse(readFileSync(file, 'utf8'));
  return ['Demo sign-ins:', ...signIns.map(({ role, email, password }) => `  ${role.padEnd(8)} ${email}  ${password}`)];
}
