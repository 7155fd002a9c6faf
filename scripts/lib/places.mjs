import { existsSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

export const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/[\\/]$/, '');

/** @param {string[]} parts */
export const inRoot = (...parts) => path.join(root, ...parts);

/** What runs in a process or thread of its own: the name in dist/server, and where it is written. */
export const entries = {
  web: 'server/main.ts',
  worker: 'jobs/worker-main.ts',
  migrate: 'server/migrate-main.ts',
  seed: 'server/seed-main.ts',
  'local-mail': 'server/local-mail-main.ts',
  'plan.worker': 'server/planning/plan.worker.ts',
  config: 'server/config.ts',
};

/** @typedef {keyof typeof entries} Entry */

/** @param {Entry} name */
export const hasEntry = (name) => existsSync(inRoot(entries[name]));

/** @param {Entry} name */
export const builtEntry = (name) => inRoot('dist/server', `${name}.js`);
