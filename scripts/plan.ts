/**
 * Plans one problem file:
 *   npm run plan -- PROBLEM.json [--seconds N] [--seed N] > PLAN.json
 * Only the plan goes to standard output. Whatever is wrong with the input is said in a line each, with exit code 2.
 */
import { readFileSync } from 'node:fs';
import { parseArgs } from 'node:util';
import { closingMilliseconds, parseProblem, plan, type Problem } from '#planner/index.ts';

const USAGE = 'usage: npm run plan -- PROBLEM.json [--seconds N] [--seed N]';

function refuse(lines: readonly string[]): never {
  for (const line of lines) process.stderr.write(`plan: ${line}\n`);
  process.exit(2);
}

const message = (error: unknown): string =>
  (error instanceof Error ? error.message : String(error)).split('\n')[0] ?? '';

function readNumber(name: string, text: string, whole: boolean): number {
  const value = Number(text);
  if (text.trim() === '' || !Number.isFinite(value) || value < 0 || (whole && !Number.isSafeInteger(value)))
    refuse([`--${name} must be a ${whole ? 'whole ' : ''}number, zero or more, is "${text}"`]);
  return value;
}

function readFlags(args: readonly string[]): { file: string; seconds: number; seed: number } {
  try {
    const { values, positionals } = parseArgs({
      args: [...args],
      allowPositionals: true,
      options: { seconds: { type: 'string', default: '10' }, seed: { type: 'string', default: '1' } },
    });
    const [file, ...more] = positionals;
    if (file === undefined || more.length) refuse([`one problem file is needed, ${positionals.length} given`, USAGE]);
    return { file, seconds: readNumber('seconds', values.seconds, false), seed: readNumber('seed', values.seed, true) };
  } catch (error) {
    return refuse([message(error), USAGE]);
  }
}

function readProblem(file: string): Problem {
  let json: unknown;
  try {
    json = JSON.parse(readFileSync(file, 'utf8'));
  } catch (error) {
    return refuse([`${file}: ${message(error)}`]);
  }
  const read = parseProblem(json);
  return 'faults' in read ? refuse(read.faults.map((fault) => `${file}: ${fault}`)) : read.problem;
}

const begun = performance.now();
const { file, seconds, seed } = readFlags(process.argv.slice(2));
const problem = readProblem(file);
const searching = Math.max(seconds * 500, seconds * 1000 - closingMilliseconds(problem));
const share = (): number => Math.min(1, (performance.now() - begun) / searching);
const made = plan(problem, { seed, share, stop: () => share() >= 1 });
process.stdout.write(`${JSON.stringify(made)}\n`);
