// `npm run bench`: the time of a first plan, and the day view beside a bare server. Figures hold within one run only.
import { cpus, loadavg } from 'node:os';
import { connect } from '#server/db/connect.ts';
import { inShop } from '#server/db/in-shop.ts';
import { migrateLatest } from '#server/db/migrate.ts';
import { loadFacts } from '#server/planning/facts.ts';
import { problemToPlan } from '#server/planning/problem/problem-to-plan.ts';
import type { Problem } from '#planner/index.ts';
import signIns from '../seeds/demo-sign-ins.json' with { type: 'json' };
import { demoShopId, seedDemo } from '../seeds/index.ts';
import { throwawayCluster } from '../tests/helpers/postgres.ts';
import { measureDayView } from './bench/day-view.ts';
import { absorbDisturbances } from './bench/disturbances.ts';
import { timeFirstPlan } from './bench/first-plans.ts';
import { growProblem } from './bench/grow-problem.ts';
import { growthExponent } from './bench/growth-exponent.ts';

const say = (line: string): boolean => process.stdout.write(`${line}\n`);
const middle = (list: readonly number[]): number => [...list].sort((a, b) => a - b)[Math.floor(list.length / 2)]!;

async function demoProblem(url: string): Promise<Problem> {
  const db = connect(url, 2);
  const now = new Date();
  const start = performance.now();
  const problem = await inShop(
    db,
    { shopId: demoShopId, accountId: null },
    async (trx) => problemToPlan(await loadFacts(trx, demoShopId, now), 'all', 1).problem,
  );
  say(`The demo shop's problem, read and built: ${(performance.now() - start).toFixed(0)} ms`);
  await db.destroy();
  return problem;
}

function sayFirstPlans(demo: Problem): void {
  const grown = [10, 40, 160].map((jobs) => timeFirstPlan(`a shop of ${jobs} jobs`, growProblem(demo, jobs)));
  say('\nFirst whole plan (middle of 5)        jobs  stages        ms        cost  unplaced');
  for (const f of [timeFirstPlan('the demo shop as it stands', demo), ...grown])
    say(
      `  ${f.name.padEnd(34)}${String(f.jobs).padStart(6)}${String(f.stages).padStart(8)}` +
        `${f.milliseconds.toFixed(1).padStart(10)}${f.cost.toFixed(0).padStart(12)}${String(f.unplaced).padStart(10)}`,
    );
  say(
    `  growth with jobs: exponent ${growthExponent(grown.map((f) => ({ size: f.jobs, cost: f.milliseconds }))).toFixed(2)}`,
  );
}

function sayDisturbances(demo: Problem): void {
  say('\nThe demo shop after a disturbance (middle of 5)   ms   moved of   unplaced  rules broken');
  for (const d of absorbDisturbances(demo))
    say(
      `  ${d.name.padEnd(44)}${d.milliseconds.toFixed(0).padStart(6)}${String(d.moved).padStart(6)} of ${d.movable}` +
        `${String(d.unplaced).padStart(8)}${String(d.violations).padStart(10)}`,
    );
}

async function sayDayView(url: string): Promise<void> {
  const lead = signIns.find(({ role }) => role === 'lead');
  if (!lead) throw new Error('The demo has no lead to sign in as.');
  const { pairs } = await measureDayView(url, { email: lead.email, password: lead.password }, 5);
  say('\nDay view beside Express + SELECT 1 (10 connections, 4 s each, in turn)');
  say('             requests/s   p50 ms   p99 ms   floor requests/s   p50 ms   p99 ms');
  const cell = (value: number, width: number): string => value.toFixed(0).padStart(width);
  for (const { day, floor } of pairs)
    say(
      `${' '.repeat(12)}${cell(day.requestsPerSecond, 11)}${cell(day.p50, 9)}${cell(day.p99, 9)}` +
        `${cell(floor.requestsPerSecond, 19)}${cell(floor.p50, 9)}${cell(floor.p99, 9)}`,
    );
  const ratio = (of: (pair: (typeof pairs)[number]) => number): string => middle(pairs.map(of)).toFixed(2);
  say(
    `  day / floor, middle of the pairs: requests/s ${ratio(({ day, floor }) => day.requestsPerSecond / floor.requestsPerSecond)}`,
  );
  say(
    `  p50 ${ratio(({ day, floor }) => day.p50 / floor.p50)}x, p99 ${ratio(({ day, floor }) => day.p99 / floor.p99)}x`,
  );
}

say(`Node ${process.version}, ${cpus().length} cores, load ${loadavg()[0]!.toFixed(1)} at the start`);
const cluster = await throwawayCluster();
try {
  const url = cluster.url('template_ovenbird');
  await migrateLatest(url);
  await seedDemo(url, new Date());
  const demo = await demoProblem(url);
  sayFirstPlans(demo);
  sayDisturbances(demo);
  await sayDayView(url);
} finally {
  await cluster.stop();
}
