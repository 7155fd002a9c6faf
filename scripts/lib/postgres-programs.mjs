import { spawnSync } from 'node:child_process';
import { accessSync, constants, existsSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { Fault } from './fault.mjs';

/** @typedef {{ initdb: string, postgres: string, major: number }} Programs */

const isRoot = process.getuid?.() === 0;

/** @param {string} file */
function isProgram(file) {
  try {
    accessSync(file, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

function binFolders() {
  const debian = '/usr/lib/postgresql';
  const versions = existsSync(debian) ? readdirSync(debian).sort((a, b) => Number(b) - Number(a)) : [];
  const onPath = (process.env['PATH'] ?? '').split(path.delimiter).filter(Boolean);
  return [...versions.map((version) => path.join(debian, version, 'bin')), ...onPath];
}

/** Every installed PostgreSQL server, the newest first as the system lists them. */
function installed() {
  /** @type {Programs[]} */
  const found = [];
  for (const folder of binFolders()) {
    const programs = { initdb: path.join(folder, 'initdb'), postgres: path.join(folder, 'postgres') };
    if (!isProgram(programs.initdb) || !isProgram(programs.postgres)) continue;
    const version = spawnSync(programs.postgres, ['--version'], { encoding: 'utf8' }).stdout ?? '';
    const major = Number(/(\d+)/.exec(version)?.[1]);
    if (major) found.push({ ...programs, major });
  }
  return found;
}

/**
 * Installs packages of the system when that can be done without asking: as root, where apt-get is.
 * @param {string[]} packages @returns {boolean} whether it was done
 */
export function installPackages(packages) {
  if (!isRoot || spawnSync('apt-get', ['--version']).status !== 0) return false;
  process.stdout.write(`Installing ${packages.join(', ')} ...\n`);
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  spawnSync('apt-get', ['-qq', 'update'], { env, stdio: ['ignore', 'ignore', 'inherit'] });
  const install = ['-qq', 'install', '-y', '--no-install-recommends', ...packages];
  return spawnSync('apt-get', install, { env, stdio: ['ignore', 'ignore', 'inherit'] }).status === 0;
}

/**
 * The programs that can serve a cluster, installed if need be.
 * @param {number | undefined} major the version that made the data, if there are any
 * @returns {Programs}
 */
export function findPrograms(major) {
  const oldest = 15;
  let all = installed();
  if (all.length === 0 && installPackages(['postgresql'])) all = installed();
  if (all.length === 0) {
    throw new Fault(
      'No PostgreSQL server found. Install one (Debian, Ubuntu: sudo apt-get install postgresql), or set DATABASE_URL to one that runs.',
    );
  }
  const fit = all.find((programs) => (major === undefined ? programs.major >= oldest : programs.major === major));
  if (fit) return fit;
  const have = all.map((programs) => programs.major).join(', ');
  throw new Fault(
    major === undefined
      ? `PostgreSQL ${oldest} or newer is needed; only ${have} is installed.`
      : `The kept data were made by PostgreSQL ${major}, but only ${have} is installed. Install postgresql-${major}.`,
  );
}
