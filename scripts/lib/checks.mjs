import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { buildServer, buildWeb } from './build.mjs';
import { sayFault } from './fault.mjs';
import { run, tool } from './run.mjs';

/** @typedef {{ passed: number, failed: number, skipped: number }} Counts */

// For every tool started below: what they print is read by programs too.
process.env['NO_COLOR'] = '1';
delete process.env['FORCE_COLOR'];

/** @param {string[]} args @param {NodeJS.ProcessEnv} [more] */
const node = (args, more = {}) => run(process.execPath, args, { ...process.env, ...more });

export const checks = {
  types: () => node([tool('typescript/bin/tsc'), '--build', '--pretty', 'false']),
  lint: () => node([tool('eslint/bin/eslint.js'), '.', '--max-warnings', '0']),
  format: () => node([tool('prettier/bin/prettier.cjs'), '--check', '--log-level', 'warn', '.']),
  build: async () => {
    try {
      await buildServer();
      await buildWeb();
      return 0;
    } catch (error) {
      sayFault(error);
      return 1;
    }
  },
};

/**
 * Runs checks one after the other and says how each went.
 * @param {(keyof typeof checks)[]} names
 * @returns {Promise<Counts>} each check is one
 */
export async function runChecks(names) {
  const counts = { passed: 0, failed: 0, skipped: 0 };
  for (const name of names) {
    const began = Date.now();
    const code = await checks[name]();
    counts[code === 0 ? 'passed' : 'failed'] += 1;
    process.stdout.write(
      `${name}: ${code === 0 ? 'passed' : 'FAILED'} (${((Date.now() - began) / 1000).toFixed(1)} s)\n`,
    );
  }
  return counts;
}

/**
 * Runs the tests. A run that fails without naming a failed test, or finds no test, counts as one failed.
 * @param {string[]} more arguments for vitest
 * @returns {Promise<Counts>}
 */
export async function runTests(more) {
  const folder = mkdtempSync(path.join(tmpdir(), 'ovenbird-counts-'));
  const file = path.join(folder, 'counts.json');
  const reporters = ['--reporter=default', '--reporter=./tests/plain-reporter.ts'];
  const args = [tool('vitest/vitest.mjs'), 'run', ...reporters, ...more];
  try {
    const code = await node(args, { OVENBIRD_TEST_COUNTS: file });
    const counts = readCounts(file);
    const nothingSaid = counts.failed === 0 && (code !== 0 || counts.passed === 0);
    return nothingSaid ? { ...counts, failed: 1 } : counts;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** @param {string} file @returns {Counts} */
function readCounts(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return { passed: 0, failed: 0, skipped: 0 };
  }
}

/** The last line of a run, and its exit code. @param {Counts[]} all */
export function conclude(all) {
  const sum = (/** @type {keyof Counts} */ name) => all.reduce((total, counts) => total + counts[name], 0);
  const skipped = sum('skipped') > 0 ? `, ${sum('skipped')} skipped` : '';
  process.stdout.write(`\n${sum('passed')} passed, ${sum('failed')} failed${skipped}\n`);
  process.exitCode = sum('failed') > 0 ? 1 : 0;
}
