import { existsSync, readFileSync } from 'node:fs';
import { Fault } from './fault.mjs';
import { inRoot } from './places.mjs';
import { cleanEnv, run } from './run.mjs';

/** @param {string} file @returns {Record<string, { version?: string, optional?: boolean }>} */
const packagesOf = (file) => JSON.parse(readFileSync(inRoot(file), 'utf8')).packages;

/** npm writes down at the end of each install what it put in place: the truth to compare the lock file with. */
function isInstalled() {
  const inPlace = 'node_modules/.package-lock.json';
  if (!existsSync(inRoot(inPlace))) return false;
  const present = packagesOf(inPlace);
  return Object.entries(packagesOf('package-lock.json')).every(
    ([place, { version, optional }]) =>
      place === '' || present[place]?.version === version || (optional === true && present[place] === undefined),
  );
}

/** Installs the packages of the lock file, unless they are in place. */
export async function installPackagesOfLock() {
  if (isInstalled()) return;
  process.stdout.write('Installing packages (about a minute) ...\n');
  const args = ['ci', '--include=dev', '--loglevel=error', '--no-audit', '--no-fund'];
  const code = await run('npm', args, cleanEnv());
  if (code !== 0) throw new Fault(`npm ${args.join(' ')} failed; its message is above.`);
}
