import { Fault } from './fault.mjs';
import { entries, hasEntry, inRoot, root } from './places.mjs';
import { cleanEnv, run, tool } from './run.mjs';
import { unlessStamped } from './stamps.mjs';
import { writeLicences } from './licences.mjs';

/** @typedef {import('./places.mjs').Entry} Entry */

const packages = ['package.json', 'package-lock.json'];
const always = ['scripts/lib/build.mjs', 'scripts/lib/licences.mjs', ...packages];

/** The server, its worker and the helpers beside them, each as one file of plain JavaScript in dist/server. */
async function bundleServer() {
  const { build } = await import('esbuild');
  const names = /** @type {Entry[]} */ (Object.keys(entries)).filter(hasEntry);
  await build({
    absWorkingDir: root,
    entryPoints: names.map((name) => ({ in: entries[name], out: name })),
    outdir: 'dist/server',
    bundle: true,
    packages: 'external',
    platform: 'node',
    format: 'esm',
    target: 'node20.19',
    jsx: 'automatic',
    sourcemap: true,
    logLevel: 'warning',
  });
}

async function bundleWeb() {
  const code = await run(process.execPath, [tool('vite/bin/vite.js'), 'build', '--logLevel', 'warn'], cleanEnv());
  if (code !== 0) throw new Fault('The pages cannot be built; the message is above.');
  await writeLicences(inRoot('dist/web/licences.json'));
}

export async function buildServer() {
  await unlessStamped({
    stamp: 'dist/.stamps/server',
    inputs: ['server', 'jobs', 'migrations', 'seeds', 'contracts', ...always],
    product: 'dist/server',
    step: () => {
      process.stdout.write('Building the server ...\n');
      return bundleServer();
    },
  });
}

export async function buildWeb() {
  await unlessStamped({
    stamp: 'dist/.stamps/web',
    inputs: [
      'src',
      'public',
      'index.html',
      'contracts',
      'server/planner',
      'vite.config.ts',
      'tailwind.config.ts',
      '.env',
      ...always,
    ],
    product: 'dist/web/index.html',
    step: () => {
      process.stdout.write('Building the pages ...\n');
      return bundleWeb();
    },
  });
}
