import type { Trx } from '#server/db/in-shop.ts';
import { loadOpenBookings, type Booking } from '#server/db/bookings.ts';
import { insertOccupancy } from '#server/db/occupancy.ts';
import { loadFacts } from '#server/planning/facts.ts';
import { judge } from '#server/planning/judge.ts';
import { occupancyRows } from '#server/planning/occupancy-rows.ts';
import { frameOf } from '#server/planning/problem/build-problem.ts';
import { spread } from './ids.ts';

const MINUTE = 60_000;

export type Happened = { stageId: string; personId: string | null; at: Date; kind: 'stage-started' | 'stage-finished' };

/**
 * Lets the posted week happen until `now`: what should have ended is done, what should have begun runs. Where more work
 * of the job followed, hands began up to three minutes late and were done up to four early, so nobody was in anybody's
 * way; cures took what they take, and what is yet to come finds things as they were planned.
 */
export async function liveWeek(trx: Trx, shopId: string, now: Date): Promise<Happened[]> {
  const bookings = (await loadOpenBookings(trx, shopId)).filter((booking) => booking.from <= now);
  const loose = await loadsFollowed(trx, shopId, now);
  const facts = bookings.map((booking) => {
    const { start, end } = times(booking, loose.has(booking.loadId));
    return {
      bookingId: booking.id,
      stageId: booking.stageId,
      personId: booking.personId,
      start,
      end,
      done: end <= now,
    };
  });
  await markStages(trx, shopId, facts);
  await finishJobs(trx, shopId);
  return facts.flatMap(({ stageId, personId, start, end, done }): Happened[] => [
    { stageId, personId, at: start, kind: 'stage-started' },
    ...(done ? [{ stageId, personId, at: end, kind: 'stage-finished' } as const] : []),
  ]);
}

type Fact = { bookingId: string; stageId: string; start: Date; end: Date; done: boolean };

async function markStages(trx: Trx, shopId: string, facts: Fact[]): Promise<void> {
  const given = { shopId, facts: JSON.stringify(facts) };
  await trx.raw(
    `update stage set state = case when f.done then 'done' else 'running' end, started_at = f.start,
            finished_at = case when f.done then f."end" end, version = case when f.done then 3 else 2 end
     from jsonb_to_recordset(:facts::jsonb) f ("stageId" uuid, start timestamptz, "end" timestamptz, done boolean)
     where stage.shop_id = :shopId and stage.id = f."stageId"`,
    given,
  );
  await trx.raw(
    `update booking set state = case when f.done then 'done' else 'running' end,
            version = case when f.done then 3 else 2 end
     from jsonb_to_recordset(:facts::jsonb) f ("bookingId" uuid, done boolean)
     where booking.shop_id = :shopId and booking.id = f."bookingId"`,
    given,
  );
}

/** Loads of which every member has a later stage that has begun by now. */
async function loadsFollowed(trx: Trx, shopId: string, now: Date): Promise<Set<string>> {
  const { rows } = await trx.raw<{ rows: { load_id: string }[] }>(
    `select b.load_id
     from booking b join stage s on s.shop_id = b.shop_id and s.id = b.stage_id
     where b.shop_id = :shopId and b.state = 'planned'
     group by b.load_id
     having bool_and(exists (
       select from stage n join booking nb on nb.shop_id = n.shop_id and nb.stage_id = n.id and nb.state = 'planned'
       where n.shop_id = s.shop_id and n.job_id = s.job_id and n.position > s.position and lower(nb.during) <= :now))`,
    { shopId, now },
  );
  return new Set(rows.map((row) => row.load_id));
}

/** The members of a load begin and end together. */
function times(booking: Booking, loose: boolean): { start: Date; end: Date } {
  const short = booking.to.getTime() - booking.from.getTime() <= 10 * MINUTE;
  if (!loose || short || booking.personId === null) return { start: booking.from, end: booking.to };
  const late = spread(`${booking.loadId}/start`, 4) * MINUTE;
  const early = spread(`${booking.loadId}/end`, 5) * MINUTE;
  return { start: new Date(booking.from.getTime() + late), end: new Date(booking.to.getTime() - early) };
}

async function finishJobs(trx: Trx, shopId: string): Promise<void> {
  await trx.raw(
    `update job set state = 'done', version = version + 1,
            finished_at = (select max(s.finished_at) from stage s where s.shop_id = job.shop_id and s.job_id = job.id)
     where job.shop_id = ? and job.state = 'open' and not exists (
       select from stage s where s.shop_id = job.shop_id and s.job_id = job.id and s.state <> 'done')`,
    [shopId],
  );
}

/** What the posted plan takes from now on, as posting writes it. */
export async function takeResources(trx: Trx, shopId: string, now: Date): Promise<void> {
  const facts = await loadFacts(trx, shopId, now);
  const judged = judge(facts, frameOf(facts), { loose: new Set(), now });
  const [broken] = judged.verdict.violations;
  if (broken) throw new Error(`The demo's plan breaks rule ${broken.rule} (${broken.code}).`);
  const loadOf = (stageId: string): string => facts.bookings.get(stageId)?.loadId ?? stageId;
  const rows = occupancyRows(judged, now, loadOf).flatMap(({ stageId, ...row }) => {
    const booking = facts.bookings.get(stageId);
    return booking ? [{ ...row, bookingId: booking.id }] : [];
  });
  await insertOccupancy(trx, shopId, rows);
}
