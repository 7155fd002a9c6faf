import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { checkPlan, type Plan } from '#planner/index.ts';
import { mode, phase, smallShop, stage } from './small-shop.ts';

const folder = mkdtempSync(join(tmpdir(), 'plan-command-'));
afterAll(() => rmSync(folder, { recursive: true }));
const PATIENCE = 60_000;

const problem = smallShop([[stage('a', mode({ phases: [phase('cool', 20, 'none')] }))]]);

function file(name: string, text: string): string {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
}

function run(...args: string[]): { status: number | null; stdout: string; stderr: string } {
  return spawnSync(process.execPath, ['--import', 'tsx', 'scripts/plan.ts', ...args], { encoding: 'utf8' });
}

describe('npm run plan', () => {
  test('writes the plan and nothing else', { timeout: PATIENCE }, () => {
    const { status, stdout, stderr } = run(
      file('good.json', JSON.stringify(problem)),
      '--seconds',
      '0.1',
      '--seed',
      '3',
    );
    expect(stderr).toBe('');
    expect(status).toBe(0);
    expect(checkPlan(problem, JSON.parse(stdout) as Plan).violations).toEqual([]);
  });

  test.each<[string, () => string[], RegExp]>([
    ['no file', () => [], /one problem file is needed/],
    ['a file that is not there', () => [join(folder, 'none.json')], /ENOENT/],
    ['text that is not JSON', () => [file('bad.json', '{')], /JSON/],
    ['another version', () => [file('v2.json', '{"version":2}')], /version must be 1, is 2/],
    [
      'an unknown id',
      () => [file('id.json', JSON.stringify({ ...problem, lamps: [{ id: 'l', kw: 1, circuit: 'x' }] }))],
      /unknown circuit "x"/,
    ],
    ['an unknown flag', () => [file('f.json', JSON.stringify(problem)), '--fast'], /--fast/],
    [
      'seconds that are no number',
      () => [file('s.json', JSON.stringify(problem)), '--seconds', 'ten'],
      /--seconds must be a number/,
    ],
    [
      'a seed that is not whole',
      () => [file('d.json', JSON.stringify(problem)), '--seed', '1.5'],
      /--seed must be a whole number/,
    ],
  ])('refuses %s', { timeout: PATIENCE }, (_what, args, line) => {
    const { status, stdout, stderr } = run(...args());
    expect(status).toBe(2);
    expect(stdout).toBe('');
    expect(stderr).toMatch(line);
    expect(stderr).not.toMatch(/ {4}at /); // no stack trace
  });
});
