import type { Knex } from 'knex';
import { cancelBookingsOfJob } from '#server/db/bookings-of-job.ts';
import { connect } from '#server/db/connect.ts';
import { inShop, type Trx } from '#server/db/in-shop.ts';
import { setJobState } from '#server/db/jobs.ts';
import { lockShop } from '#server/db/locks.ts';
import { wipeDemo } from '#server/db/wipe-shop.ts';
import { demoCalendar, type DemoCalendar } from './calendar.ts';
import { demoId } from './ids.ts';
import { jobs } from './jobs.ts';
import { liveWeek, takeResources } from './live-week.ts';
import { people } from './people.ts';
import { postWeek } from './post-week.ts';
import { accountOf, putInAccounts, tieAccounts } from './put-in-accounts.ts';
import { putInAir } from './put-in-air.ts';
import { putInHistory, type Line } from './put-in-history.ts';
import { enteredAt, jobIdOf, putInJob } from './put-in-jobs.ts';
import { putInShop } from './put-in-shop.ts';
import { shop } from './shop.ts';

export const demoShopId = demoId('shop', shop.name);

/**
 * Puts a shop to look at into an empty database, in the middle of its week as of `now`: a plan posted three working days
 * ago, work done, running and still to come, jobs that nobody has planned yet. All of it or nothing.
 * @returns false, and nothing is touched, where anybody has an account already.
 */
export async function seedDemo(ownerUrl: string, now: Date): Promise<boolean> {
  const db = connect(ownerUrl, 2);
  try {
    return await inShop(db, { shopId: demoShopId, accountId: null }, async (trx) => {
      // Two that start at once: the second waits and then finds the accounts of the first.
      await trx.raw(`select pg_advisory_xact_lock(hashtextextended('demo shop', 0))`);
      if (await hasAccounts(trx)) return false;
      await putInDemo(trx, demoCalendar(now, shop.timeZone));
      return true;
    });
  } finally {
    await db.destroy();
  }
}

/** Shops cannot be seen from outside of them, but every shop has an owner's account. */
async function hasAccounts(trx: Knex): Promise<boolean> {
  const account = await trx('account').first<{ id: string } | undefined>('id');
  return account !== undefined;
}

/** Empties the demo shop and puts it in again as of `now`. Accounts stay, and who belongs to it. */
export async function putBackDemo(trx: Trx, now: Date): Promise<void> {
  await lockShop(trx, demoShopId);
  await wipeDemo(trx, demoShopId);
  const calendar = demoCalendar(now, shop.timeZone);
  await putInShop(trx, demoShopId, calendar);
  await tieAccounts(trx, demoShopId);
  await putInWeek(trx, calendar);
}

async function putInDemo(trx: Trx, calendar: DemoCalendar): Promise<void> {
  await putInShop(trx, demoShopId, calendar);
  await putInAccounts(trx, demoShopId);
  await putInWeek(trx, calendar);
}

/** Jobs, the posted plan and what came of it until now. */
async function putInWeek(trx: Trx, calendar: DemoCalendar): Promise<void> {
  const postedAt = calendar.at(-3, '06:30');
  const history: Line[] = [];
  const enter = async (fates: string[]): Promise<void> => {
    for (const seed of jobs.filter(({ fate }) => fates.includes(fate))) {
      const at = enteredAt(seed, calendar, postedAt);
      await putInJob(trx, demoShopId, seed, { calendar, enteredAt: at });
      history.push({ at, accountId: accountOf('Ennet'), kind: 'job-created', ids: [jobIdOf(seed)] });
    }
  };
  await enter(['planned', 'withdrawn']);
  const { stageIds } = await postWeek(trx, demoShopId, postedAt);
  history.push({
    at: postedAt,
    accountId: accountOf('Orlin'),
    kind: 'plan-posted',
    ids: [demoId('plan', '1'), ...stageIds],
    detail: { planNumber: 1, changed: stageIds.length },
  });
  await enter(['new']);
  history.push(...(await withdraw(trx, calendar)), ...(await happen(trx, calendar.now)));
  await takeResources(trx, demoShopId, calendar.now);
  await putInAir(trx, demoShopId, calendar);
  await putInHistory(trx, demoShopId, history);
}

async function withdraw(trx: Trx, calendar: DemoCalendar): Promise<Line[]> {
  const lines: Line[] = [];
  for (const seed of jobs.filter(({ fate }) => fate === 'withdrawn')) {
    const id = jobIdOf(seed);
    await setJobState(trx, demoShopId, { id, state: 'withdrawn', finishedAt: null });
    const bookings = await cancelBookingsOfJob(trx, demoShopId, id);
    const at = calendar.at(-1, '15:10');
    lines.push({ at, accountId: accountOf('Ennet'), kind: 'job-withdrawn', ids: [id], detail: { bookings } });
  }
  return lines;
}

async function happen(trx: Trx, now: Date): Promise<Line[]> {
  const happened = await liveWeek(trx, demoShopId, now);
  const stages = await trx('stage')
    .where({ shop_id: demoShopId })
    .select<{ id: string; job_id: string; title: string }[]>('id', 'job_id', 'title');
  const stageOf = new Map(stages.map((stage) => [stage.id, stage]));
  const names = new Map(people.map(({ name }) => [demoId('person', name), name]));
  return happened.map(({ stageId, personId, at, kind }) => {
    const stage = stageOf.get(stageId);
    return {
      at,
      kind,
      accountId: accountOf(names.get(personId ?? '') ?? ''),
      ids: [stageId, ...(stage ? [stage.job_id] : [])],
      detail: { stages: stage ? [stage.title] : [] },
    };
  });
}
