/**
 * Measures the planner against published and reference values, one table:
 *   npm run bench:planner -- [--seconds 1,10] [--only classics,no-wait,shops,growth,landings,random]
 *     [--growth-seconds 60] [--problems 2000] [--data FOLDER] [--keep]
 * Seconds are those of one core (user time of this process), so that a busy machine changes little. `--keep` adds the
 * figures to docs/bench/planner-DATE.json.
 */
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { cpus, loadavg } from 'node:os';
import { pathToFileURL } from 'node:url';
import { parseArgs } from 'node:util';
import { checkPlan, landings, plan, type Plan, type Problem } from '#planner/index.ts';
import { classicProblem, readClassics } from '../tests/planner/classics.ts';
import { coreSeconds } from './bench/core-seconds.ts';
import { growthExponent } from './bench/growth-exponent.ts';
import { type Growth, grownShop, measureGrowth } from './bench/planner-growth.ts';
import { runRandomProblems } from './bench/planner-random.ts';

type Row = {
  what: string;
  seconds: number;
  value: string;
  target: string;
  evaluationsPerSecond: number;
  detail: string;
};
type Reference = { set: string; args: Record<string, number>; seed: number; loads: boolean; bestCost: number };

const { values: flags } = parseArgs({
  options: {
    seconds: { type: 'string', default: '1' },
    only: { type: 'string', default: 'classics,no-wait,shops,growth,landings,random' },
    'growth-seconds': { type: 'string', default: '60' },
    problems: { type: 'string', default: '2000' },
    data: { type: 'string', default: new URL('../tests/planner/data', import.meta.url).pathname },
    sets: { type: 'string', default: 'S1,S2,M1,L1,L2,X1' },
    keep: { type: 'boolean', default: false },
  },
});
const budgets = flags.seconds.split(',').map(Number);
const wanted = new Set(flags.only.split(','));
const rows: Row[] = [];

type Run = { made: Plan; seconds: number };

function run(problem: Problem, seconds: number, seed = 1): Run {
  const begun = coreSeconds();
  const gone = (): number => coreSeconds() - begun;
  const made = plan(problem, { seed, stop: () => gone() >= seconds, share: () => Math.min(1, gone() / seconds) });
  const { violations } = checkPlan(problem, made);
  if (violations.length) throw new Error(`a plan breaks rule ${violations[0]!.rule}`);
  return { made, seconds: gone() };
}

const mean = (list: readonly number[]): number => list.reduce((x, y) => x + y, 0) / list.length;
const geometric = (list: readonly number[]): number => Math.exp(mean(list.map(Math.log)));
const perSecond = (runs: readonly Run[]): number => mean(runs.map((r) => r.made.stats.evaluations / r.seconds));

function add(row: Row): void {
  rows.push(row);
  const each = row.evaluationsPerSecond ? `${(1e6 / row.evaluationsPerSecond).toFixed(0)} us` : '';
  const rate = row.evaluationsPerSecond ? `${row.evaluationsPerSecond.toFixed(0)}/s` : '';
  const cells = [row.what.padEnd(26), `${row.seconds} s`.padStart(6), row.value.padStart(10), row.target.padEnd(10)];
  console.log(`| ${cells.join(' | ')} | ${rate.padStart(9)} | ${each.padStart(8)} | ${row.detail}`);
}

type Group = { what: string; file: string; names: RegExp; noWait: boolean; target: string };

const GROUPS: Group[] = [
  { what: 'FT06, LA01-05', file: 'jobshop.json', names: /^(ft06|la0[1-5])$/, noWait: false, target: '0 %' },
  { what: 'LA01-40', file: 'jobshop.json', names: /^la/, noWait: false, target: '<= 0.7 %' },
  { what: 'FT, ORB, ABZ', file: 'jobshop.json', names: /^(ft|orb|abz)/, noWait: false, target: '<= 1.6 %' },
  { what: 'mk01-10', file: 'flexible-jobshop.json', names: /^mk(0\d|10)$/, noWait: false, target: '<= 1.5 %' },
  { what: 'no-wait FT06, LA01-05', file: 'jobshop.json', names: /^(ft06|la0[1-5])$/, noWait: true, target: '0 %' },
  { what: 'no-wait FT, LA, ORB', file: 'jobshop.json', names: /^(ft|la|orb)/, noWait: true, target: '<= 3 %' },
];

function classics(group: Group, seconds: number): void {
  const file = readClassics(flags.data, group.file);
  const runs: Run[] = [];
  const gaps: number[] = [];
  const detail: string[] = [];
  for (const instance of file.instances.filter((i) => group.names.test(i.name.toLowerCase()))) {
    const best = group.noWait ? file.no_wait?.[instance.name]?.best : instance.ub;
    if (best === undefined) continue;
    const one = run(classicProblem(instance, group.noWait), seconds);
    runs.push(one);
    gaps.push((one.made.cost / best - 1) * 100);
    detail.push(`${instance.name} ${one.made.cost}/${best}`);
  }
  const value = `${mean(gaps).toFixed(2)} %`;
  add({
    what: group.what,
    seconds,
    value,
    target: group.target,
    evaluationsPerSecond: perSecond(runs),
    detail: detail.join(' '),
  });
}

const { makeShop } = (await import(pathToFileURL(`${flags.data}/make-shop.mjs`).href)) as {
  makeShop: (args: Record<string, number | boolean>) => Problem;
};

function shops(set: string, seconds: number): void {
  const { problems } = JSON.parse(readFileSync(`${flags.data}/shop-reference.json`, 'utf8')) as {
    problems: Reference[];
  };
  const runs: Run[] = [];
  const ratios: number[] = [];
  for (const r of problems.filter((p) => p.set === set)) {
    const one = run(makeShop({ ...r.args, seed: r.seed, loads: r.loads }), seconds);
    runs.push(one);
    ratios.push(one.made.cost / r.bestCost);
  }
  const detail = ratios.map((x) => x.toFixed(2)).join(' ');
  add({
    what: `shop ${set}`,
    seconds,
    value: geometric(ratios).toFixed(3),
    target: 'of best',
    evaluationsPerSecond: perSecond(runs),
    detail,
  });
}

/** First plan, time to near the end's cost, and memory, as the shop grows with the number of jobs. */
function growth(): void {
  const seconds = Number(flags['growth-seconds']);
  const all = [10, 40, 160, 640].map((jobs) => measureGrowth(makeShop(grownShop(jobs)), seconds));
  for (const g of all)
    add({
      what: `growth, ${g.jobs} jobs`,
      seconds,
      value: `${g.first.toFixed(3)} s`,
      target: g.jobs === 640 ? '< 2 s' : '',
      evaluationsPerSecond: 0,
      detail: `first plan; within 5 % after ${g.close.toFixed(2)} s; ${g.megabytes} MB; ${g.stages} stages, ${g.unplaced} jobs unplaced`,
    });
  const exponent = (of: (g: Growth) => number): string =>
    growthExponent(all.map((g) => ({ size: g.jobs, cost: of(g) }))).toFixed(2);
  add({
    what: 'growth, exponents',
    seconds,
    value: exponent((g) => g.first),
    target: '< 1.3',
    evaluationsPerSecond: 0,
    detail: `first plan; within 5 % ${exponent((g) => g.close)}; memory ${exponent((g) => g.megabytes)}`,
  });
}

async function randomProblems(): Promise<void> {
  const { problems, faults, unplaced, worstOverrun, judges } = await runRandomProblems(Number(flags.problems));
  add({
    what: `${problems} random problems`,
    seconds: 0.04,
    value: `${faults.length} faults`,
    target: '0',
    evaluationsPerSecond: 0,
    detail: `${judges} checkers; worst overrun ${worstOverrun.toFixed(0)} ms; ${unplaced} jobs unplaced, each with its reason`,
  });
  for (const fault of faults.slice(0, 20)) console.log(fault);
}

function landingTimes(): void {
  const problem = makeShop({ jobs: 30, days: 3, booths: 2, prep: 4, lamps: 3, people: 6, seed: 131, loads: false });
  const made = plan(problem, { seed: 1, evaluations: 200 });
  const begun = coreSeconds();
  for (const a of made.assignments) landings(problem, made, a.stage);
  const each = ((coreSeconds() - begun) / made.assignments.length) * 1000;
  add({
    what: 'landings of one stage',
    seconds: 0,
    value: `${each.toFixed(1)} ms`,
    target: '< 20 ms',
    evaluationsPerSecond: 0,
    detail: `30 jobs, mean of ${made.assignments.length} stages`,
  });
}

console.log(
  `node ${process.version}, ${cpus().length} cores, load ${loadavg()
    .map((x) => x.toFixed(1))
    .join(' ')}`,
);
console.log('| what | core seconds | value | target | evaluations | one takes | detail');
run(makeShop({ jobs: 8, days: 1, booths: 1, prep: 2, lamps: 2, people: 4, seed: 1, loads: false }), 1); // warm
for (const seconds of budgets) {
  for (const g of GROUPS) if (wanted.has(g.noWait ? 'no-wait' : 'classics')) classics(g, seconds);
  if (wanted.has('shops')) for (const set of flags.sets.split(',')) shops(set, seconds);
}
if (wanted.has('growth')) growth();
if (wanted.has('landings')) landingTimes();
if (wanted.has('random')) await randomProblems();
/** Adds the rows to what the day has kept already; the same measure again replaces the older one. */
function keep(): void {
  const date = new Date().toISOString().slice(0, 10);
  const file = new URL(`../docs/bench/planner-${date}.json`, import.meta.url).pathname;
  const kept = existsSync(file) ? (JSON.parse(readFileSync(file, 'utf8')) as { rows: Row[] }).rows : [];
  const timed = (row: Row): string => `${row.what} ${row.seconds}`;
  const mine = new Set(rows.map(timed));
  const all = [...kept.filter((row) => !mine.has(timed(row))), ...rows];
  writeFileSync(file, `${JSON.stringify({ date, node: process.version, load: loadavg(), rows: all }, null, 1)}\n`);
  console.log(`kept in ${file}`);
}

if (flags.keep) keep();
