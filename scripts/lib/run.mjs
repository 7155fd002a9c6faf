import { spawn } from 'node:child_process';
import { root } from './places.mjs';

/**
 * The environment without what npm and NODE_ENV add: with those an inner `npm ci` leaves out the build tools.
 * @returns {NodeJS.ProcessEnv}
 */
export function cleanEnv() {
  const npm = /^npm_(config|package|lifecycle|command|execpath|node_execpath)/;
  return Object.fromEntries(Object.entries(process.env).filter(([key]) => key !== 'NODE_ENV' && !npm.test(key)));
}

/**
 * Runs a program in the project's root with this terminal's output.
 * @param {string} command @param {string[]} args @param {NodeJS.ProcessEnv} [env]
 * @returns {Promise<number>} its exit code; 1 when a signal ended it
 */
export function run(command, args, env = process.env) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { cwd: root, env, stdio: ['ignore', 'inherit', 'inherit'] });
    const pass = (/** @type {NodeJS.Signals} */ signal) => child.kill(signal);
    process.on('SIGTERM', pass).on('SIGINT', pass);
    child.once('error', reject);
    child.once('exit', (code) => {
      process.removeListener('SIGTERM', pass).removeListener('SIGINT', pass);
      resolve(code ?? 1);
    });
  });
}

/** Path of a tool's program, to be run by this same Node. @param {string} file inside node_modules */
export const tool = (file) => `${root}/node_modules/${file}`;
