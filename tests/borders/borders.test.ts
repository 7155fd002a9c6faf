import { spawnSync } from 'node:child_process';
import path from 'node:path';
import { ESLint } from 'eslint';
import { describe, expect, test } from 'vitest';
import { crossing } from '../../scripts/lint/borders.mjs';

const here = import.meta.dirname;

describe('lint refuses the kept bad examples', () => {
  const eslint = new ESLint({ cwd: path.resolve(here, '../..'), ignore: false });
  const examples = [
    ['planner/server/planner/looks-outside.ts', 'borders/one-way', ['node:fs', 'migrate.ts']],
    ['chemistry/server/chemistry/asks-the-planner.ts', 'borders/one-way', ['check-plan.ts']],
    ['contracts/contracts/knows-the-server.ts', 'borders/one-way', ['errors.ts']],
    ['sheets/server/sheets/asks-the-planner.ts', 'borders/one-way', ['check-plan.ts', 'uuid']],
    [
      'service/server/services/answers-a-request.ts',
      'borders/one-way',
      ["'express'", "'nodemailer'", 'send-letter.ts'],
    ],
    ['http/server/http/asks-the-database.ts', 'borders/one-way', ["'knex'", '#server/db']],
    ['feature/src/features/day/borrows.ts', 'borders/one-way', ['../jobs', '#server/services']],
    ['sql/server/db/builds-sql.ts', 'no-restricted-syntax', ['db.raw(`select', 'db.whereRaw(']],
  ] as const;

  test.each(examples)('%s by %s', async (file, rule, refused) => {
    const [result] = await eslint.lintFiles(path.join(here, `fixture-${file}`));
    const lines = (result?.source ?? '').split('\n');
    const found = (result?.messages ?? [])
      .filter(({ ruleId }) => ruleId === rule)
      .map(({ line }) => lines[line - 1] ?? '');
    expect(found).toEqual(refused.map((part) => expect.stringContaining(part) as string));
  });
});

test('the compiler refuses the planner a look outside: no Node, no document, no other folder', () => {
  const tsc = path.resolve('node_modules/typescript/bin/tsc');
  const { stdout } = spawnSync(process.execPath, [tsc, '-p', path.join(here, 'fixture-planner')], { encoding: 'utf8' });
  expect(stdout).toMatch(/looks-outside\.ts.*Cannot find name 'node:fs'/);
  expect(stdout).toMatch(/looks-outside\.ts.*Cannot find name 'process'/);
  expect(stdout).toMatch(/looks-outside\.ts.*Cannot find name 'document'/);
  expect(stdout).toMatch(/looks-outside\.ts.*migrate\.ts' is not under 'rootDir'/);
}, 60_000);

describe('a border', () => {
  test.each([
    ['server/services/post-plan.ts', '../db/plans.ts'],
    ['server/services/post-plan.ts', '#planner/index.ts'],
    ['server/http/plans.ts', '#contracts/plan.ts'],
    ['server/app.ts', './db/pool.ts'],
    ['jobs/tasks/send-letters.ts', '#server/mail/send-letter.ts'],
    ['src/features/day/board.tsx', '#src/ui/button.tsx'],
    ['src/features/day/board.tsx', '../../app/paths.ts'],
    ['src/app/router.tsx', '../features/day/page.tsx'],
    ['src/features/day/drag/landing.ts', '../geometry.ts'],
    ['src/features/cure/model/dew.ts', '#chemistry/air/dew-point.ts'],
  ])('lets %s import %s', (from, specifier) => {
    expect(crossing(from, specifier)).toBeUndefined();
  });

  test.each([
    ['server/db/jobs.ts', '../services/post-plan.ts'],
    ['server/services/post-plan.ts', '../http/plans.ts'],
    ['server/planning/build-problem.ts', '#server/services/post-plan.ts'],
    ['server/planner/rules/bake.ts', '../../chemistry/bake.ts'],
    ['src/ui/button.tsx', '#src/features/day/board.tsx'],
    ['src/lib/api.ts', 'node:fs'],
    ['src/ui/button.tsx', '#chemistry/air/dew-point.ts'],
    ['jobs/worker.ts', '#server/http/plans.ts'],
    ['migrations/202612010900_ground.ts', '#server/db/jobs.ts'],
  ])('stops %s from importing %s', (from, specifier) => {
    expect(crossing(from, specifier)).toMatch(/may not import/);
  });
});
