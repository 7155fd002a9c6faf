import { plan } from '#planner/index.ts';
import { insertBookings } from '#server/db/bookings.ts';
import type { Trx } from '#server/db/in-shop.ts';
import { insertPostedPlan } from '#server/db/posted-plans.ts';
import { airOfPlan } from '#server/planning/air/air-of-plan.ts';
import { loadFacts } from '#server/planning/facts.ts';
import { problemToPlan } from '#server/planning/problem/problem-to-plan.ts';
import { readPlan, readUnplaced } from '#server/planning/read-plan.ts';
import { demoId } from './ids.ts';
import { accountOf } from './put-in-accounts.ts';

/** Counted, not timed, so that the demo is the same on a slow machine. */
const EVALUATIONS = 400;

/** Lets the planner plan what is there, as of `at`, and posts it as plan 1. */
export async function postWeek(trx: Trx, shopId: string, at: Date): Promise<{ stageIds: string[] }> {
  const facts = await loadFacts(trx, shopId, at);
  const built = problemToPlan(facts, 'all', 0);
  const made = plan(built.problem, { seed: 1, evaluations: EVALUATIONS });
  const [unplaced] = readUnplaced(facts, built, made);
  if (unplaced) throw new Error(`The demo's plan has no room for a job: ${unplaced.reason}`);
  let loads = 0;
  const booked = readPlan(facts, built, made, () => demoId('load', String((loads += 1))));
  const bookings = booked.map((booking) => ({ ...booking, id: demoId('booking', booking.stageId) }));
  await insertBookings(trx, shopId, 1, bookings);
  await insertPostedPlan(trx, shopId, {
    id: demoId('plan', '1'),
    number: 1,
    at,
    accountId: accountOf('Orlin'),
    cost: made.cost,
    body: { bookings },
    air: airOfPlan(facts.air, at),
  });
  return { stageIds: bookings.map(({ stageId }) => stageId) };
}
