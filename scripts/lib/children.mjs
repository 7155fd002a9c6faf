import { spawn, spawnSync } from 'node:child_process';
import { once } from 'node:events';
import { readFileSync } from 'node:fs';

/** @typedef {import('node:child_process').ChildProcess} Child */

/** Linux can end a child when its parent dies, even by SIGKILL; elsewhere an orphan is found and stopped at the next start. */
const canTie = process.platform === 'linux' && spawnSync('setpriv', ['--pdeathsig', 'TERM', 'true']).status === 0;

/**
 * Starts a process that does not outlive this one. It has its own process group, so that Ctrl-C reaches only the
 * parent, which then stops its children in order.
 * @param {string} command
 * @param {string[]} args
 * @param {import('node:child_process').SpawnOptions & { deathSignal?: 'TERM' | 'INT' }} options
 * @returns {Child}
 */
export function spawnTied(command, args, { deathSignal = 'TERM', ...options }) {
  const [file, ...rest] = canTie ? ['setpriv', '--pdeathsig', deathSignal, command, ...args] : [command, ...args];
  const child = spawn(/** @type {string} */ (file), rest, { ...options, detached: true });
  const endWithParent = () => child.kill(`SIG${deathSignal}`);
  process.once('exit', endWithParent);
  child.once('exit', () => process.removeListener('exit', endWithParent));
  return child;
}

/** @param {Child} child */
export const hasEnded = (child) => child.exitCode !== null || child.signalCode !== null;

/**
 * Asks a child to stop and waits for its end; ends it by force after `patience` ms.
 * @param {Child} child @param {NodeJS.Signals} signal @param {number} patience
 */
export async function stopChild(child, signal = 'SIGTERM', patience = 10_000) {
  if (hasEnded(child) || child.pid === undefined) return;
  const ended = once(child, 'exit');
  child.kill(signal);
  const force = setTimeout(() => child.kill('SIGKILL'), patience);
  await ended;
  clearTimeout(force);
}

/** @param {number} pid */
export function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return /** @type {NodeJS.ErrnoException} */ (error).code === 'EPERM';
  }
}

/**
 * A mark that tells a process from a later one with the same number: its start time in clock ticks since boot.
 * Empty where the system does not say.
 * @param {number} pid
 */
export function birthOf(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    return stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19] ?? '';
  } catch {
    return '';
  }
}
