import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import * as fs from 'node:fs';
import path from 'node:path';
import { birthOf, isAlive } from './children.mjs';
import { Fault } from './fault.mjs';
import { findPrograms } from './postgres-programs.mjs';

/** @typedef {{ uid: number, gid: number } | undefined} Identity the user PostgreSQL runs as; undefined: the one who starts it */

/**
 * PostgreSQL refuses to run as root: then it runs as whoever owns the data, at first the system's user `postgres`. That user
 * must be able to reach the folder, so under a closed parent (a home folder) the data go to /var/lib instead.
 * @param {string} wanted
 * @returns {{ folder: string, identity: Identity }}
 */
export function settleFolder(wanted) {
  try {
    fs.mkdirSync(wanted, { recursive: true, mode: 0o711 });
  } catch (error) {
    throw new Fault(`The data folder ${wanted} cannot be made: ${/** @type {Error} */ (error).message}`);
  }
  if (process.getuid?.() !== 0) {
    const stranger = fs.statSync(wanted).uid !== process.getuid?.();
    if (stranger)
      throw new Fault(`The data folder ${wanted} belongs to another user. Start as that user, or move it away.`);
    fs.chmodSync(wanted, 0o700);
    return { folder: wanted, identity: undefined };
  }
  const identity = ownerOf(path.join(wanted, 'pgdata')) ?? systemPostgres();
  const reachable =
    spawnSync('/bin/sh', ['-c', 'cd "$0"', path.dirname(wanted)], { ...identity, cwd: '/' }).status === 0;
  const elsewhere = `/var/lib/ovenbird/${createHash('sha256').update(wanted).digest('hex').slice(0, 12)}`;
  const folder = reachable ? wanted : elsewhere;
  fs.mkdirSync(folder, { recursive: true, mode: 0o711 });
  fs.chownSync(folder, identity.uid, identity.gid);
  fs.chmodSync(folder, 0o700);
  return { folder, identity };
}

/** @param {string} file */
function ownerOf(file) {
  const { uid, gid } = fs.statSync(file, { throwIfNoEntry: false }) ?? { uid: 0, gid: 0 };
  return uid === 0 ? undefined : { uid, gid };
}

function systemPostgres() {
  const find = () => /^postgres:[^:]*:(\d+):(\d+):/m.exec(fs.readFileSync('/etc/passwd', 'utf8'));
  let line = find();
  if (!line) {
    findPrograms(undefined);
    line = find();
  }
  if (!line)
    throw new Fault(
      'PostgreSQL does not run as root, and this system has no user "postgres". Start as an ordinary user.',
    );
  return { uid: Number(line[1]), gid: Number(line[2]) };
}

/**
 * A server may still hold the data: of a start that runs now (refused), or one whose parent was killed (stopped). A pid
 * file whose number meanwhile belongs to another program would make PostgreSQL refuse: removed.
 * @param {string} folder @param {string} data
 */
export async function clearTheWay(folder, data) {
  const pidFile = path.join(data, 'postmaster.pid');
  if (!fs.existsSync(pidFile)) return;
  const pid = parseInt(fs.readFileSync(pidFile, 'utf8'));
  if (!(pid > 0) || !isAlive(pid)) return;
  if (!/postgres|postmaster/.test(nameOf(pid))) return fs.rmSync(pidFile);
  const [keeper = 0, birth = ''] = readWords(path.join(folder, 'keeper'));
  if (Number(keeper) > 0 && isAlive(Number(keeper)) && birthOf(Number(keeper)) === birth) {
    throw new Fault(`The data in ${folder} are in use by a running start (process ${keeper}). Stop that one first.`);
  }
  process.kill(pid, 'SIGINT');
  for (let waited = 0; isAlive(pid); waited += 50) {
    if (waited > 20_000)
      throw new Fault(`The database server left behind in ${folder} (process ${pid}) does not stop.`);
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
}

/** @param {number} pid */
function nameOf(pid) {
  return spawnSync('ps', ['-o', 'comm=', '-p', String(pid)], { encoding: 'utf8' }).stdout ?? '';
}

/** @param {string} file */
export function readWords(file) {
  return fs.existsSync(file) ? fs.readFileSync(file, 'utf8').trim().split(' ') : [];
}
