import { once } from 'node:events';
import { hasEnded, spawnTied, stopChild } from './children.mjs';
import { Fault } from './fault.mjs';
import { root } from './places.mjs';

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
