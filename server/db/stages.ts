import type { Way } from '#contracts/sheets.ts';
import type { Trx } from './in-shop.ts';

export type StageState = 'waiting' | 'running' | 'done';

export type BookingFacts = {
  id: string;
  way: string;
  placeId: string;
  placeName: string;
  personId: string | null;
  personName: string | null;
  lampNames: string[];
  from: Date;
  to: Date;
  /** Whole minutes from the start of the booking. */
  phases: [number, number][];
  pinned: boolean;
  state: 'planned' | 'running' | 'done';
};

export type StageFacts = {
  id: string;
  position: number;
  kind: string;
  title: string;
  state: StageState;
  startedAt: Date | null;
  finishedAt: Date | null;
  ways: Way[];
  /** Why it was begun although the dew-point gate was shut, with the name of who said so. */
  overruled: { rule: 'dew-point'; reason: string; by: string | null; at: string; figures: number[] } | null;
};

export type BookedStage = StageFacts & { booking: BookingFacts | null };

type FlatStage = StageFacts & { [K in keyof BookingFacts as `booking:${K}`]: BookingFacts[K] | null };

/** The stages of a job in order, each with its live booking. */
export async function stagesOfJob(trx: Trx, shopId: string, jobId: string): Promise<BookedStage[]> {
  const { rows } = await trx.raw<{ rows: FlatStage[] }>(
    `select s.id, s.position, s.kind, s.title, s.state, s.started_at as "startedAt", s.finished_at as "finishedAt", s.ways,
            s.overruled || jsonb_build_object('by', (select name from account where id = (s.overruled ->> 'by')::uuid)) as overruled,
            b.id as "booking:id", b.way as "booking:way", b.place_id as "booking:placeId", place.name as "booking:placeName",
            b.person_id as "booking:personId", person.name as "booking:personName",
            lower(b.during) as "booking:from", upper(b.during) as "booking:to", b.phases as "booking:phases",
            b.pinned as "booking:pinned", b.state as "booking:state",
            array(select lamp.name from lamp where lamp.shop_id = b.shop_id and lamp.id = any (b.lamp_ids)
                  order by lamp.position, lamp.name) as "booking:lampNames"
     from stage s
     left join booking b on b.shop_id = s.shop_id and b.stage_id = s.id and b.state <> 'cancelled'
     left join place on place.shop_id = b.shop_id and place.id = b.place_id
     left join person on person.shop_id = b.shop_id and person.id = b.person_id
     where s.shop_id = ? and s.job_id = ?
     order by s.position`,
    [shopId, jobId],
  );
  return rows.map(nest);
}

function nest(row: FlatStage): BookedStage {
  const { id, position, kind, title, state, startedAt, finishedAt, ways, overruled } = row;
  const entries = Object.entries(row).flatMap(([key, value]) =>
    key.startsWith('booking:') ? [[key.slice('booking:'.length), value]] : [],
  );
  const booking = row['booking:id'] === null ? null : (Object.fromEntries(entries) as BookingFacts);
  return { id, position, kind, title, state, startedAt, finishedAt, ways, overruled, booking };
}

export async function insertStages(
  trx: Trx,
  shopId: string,
  jobId: string,
  stages: { id: string; kind: string; title: string; coatingId?: string | null; ways: Way[] }[],
): Promise<void> {
  await trx('stage').insert(
    stages.map((stage, position) => ({
      shop_id: shopId,
      job_id: jobId,
      position,
      id: stage.id,
      kind: stage.kind,
      title: stage.title,
      coating_id: stage.coatingId ?? null,
      ways: JSON.stringify(stage.ways),
    })),
  );
}

/** A stage as it is when somebody taps start or done. */
export type TappedStage = {
  id: string;
  jobId: string;
  title: string;
  version: number;
  state: StageState;
  startedAt: Date | null;
  jobState: 'open' | 'done' | 'withdrawn';
  bookingId: string | null;
  personId: string | null;
  loadId: string | null;
  previousId: string | null;
  previousTitle: string | null;
  previousState: StageState | null;
  /** Where it is booked, and whether its way sprays there. */
  zoneId: string | null;
  sprays: boolean;
};

const loadOf = `
  s.id in (
    select :stageId::uuid
    union
    select b.stage_id
    from booking own
    join booking b on b.shop_id = own.shop_id and b.place_id = own.place_id and b.load_id = own.load_id
      and b.during && own.during and b.state <> 'cancelled'
    where own.shop_id = :shopId and own.stage_id = :stageId and own.state <> 'cancelled')`;

/**
 * The stage and the others of its load, held together with their jobs until the transaction ends, in the order of
 * locks.ts. Read after they are held: whoever waited sees what the one before has written.
 */
export async function lockTapped(trx: Trx, shopId: string, stageId: string): Promise<TappedStage[]> {
  const held = await trx('stage as s')
    .where({ 's.shop_id': shopId })
    .whereRaw(loadOf, { shopId, stageId })
    .orderBy('s.id')
    .forNoKeyUpdate()
    .select<{ id: string; job_id: string }[]>('s.id', 's.job_id');
  await trx('job')
    .where({ shop_id: shopId })
    .whereIn(
      'id',
      held.map((stage) => stage.job_id),
    )
    .orderBy('id')
    .forNoKeyUpdate()
    .select('id');
  const { rows } = await trx.raw<{ rows: TappedStage[] }>(TAPPED, { shopId, stageIds: held.map(({ id }) => id) });
  const load = rows.find(({ id }) => id === stageId)?.loadId;
  return rows.filter((stage) => stage.id === stageId || (load !== null && stage.loadId === load));
}

const TAPPED = `
  select s.id, s.job_id as "jobId", s.title, s.version, s.state, s.started_at as "startedAt", j.state as "jobState",
         b.id as "bookingId", b.person_id as "personId", b.load_id as "loadId",
         previous.id as "previousId", previous.title as "previousTitle", previous.state as "previousState",
         place.zone_id as "zoneId",
         exists (select 1 from jsonb_array_elements(s.ways) w, jsonb_array_elements(w -> 'phases') p
                 where w ->> 'id' = b.way and p ->> 'kind' = 'spray') as sprays
  from stage s
  join job j on j.shop_id = s.shop_id and j.id = s.job_id
  left join booking b on b.shop_id = s.shop_id and b.stage_id = s.id and b.state <> 'cancelled'
  left join place on place.shop_id = b.shop_id and place.id = b.place_id
  left join lateral (
    select p.id, p.title, p.state from stage p
    where p.shop_id = s.shop_id and p.job_id = s.job_id and p.position < s.position
    order by p.position desc limit 1
  ) previous on true
  where s.shop_id = :shopId and s.id = any (:stageIds)
  order by s.id`;

/** Holds the stages of a job, in the order of locks.ts. */
export async function lockStagesOf(trx: Trx, shopId: string, jobId: string): Promise<void> {
  await trx('stage').where({ shop_id: shopId, job_id: jobId }).orderBy('id').forNoKeyUpdate().select('id');
}

export async function markStarted(trx: Trx, shopId: string, stageIds: string[], at: Date): Promise<void> {
  await trx('stage')
    .where({ shop_id: shopId })
    .whereIn('id', stageIds)
    .update({ state: 'running', started_at: at })
    .increment('version', 1);
  await markBookings(trx, shopId, stageIds, 'running');
}

/** Keeps with stages why they were begun although a gate was shut. */
export async function keepOverruled(trx: Trx, shopId: string, stageIds: string[], overruled: object): Promise<void> {
  await trx('stage')
    .where({ shop_id: shopId })
    .whereIn('id', stageIds)
    .update({ overruled: JSON.stringify(overruled) });
}

/** Also where the clock was put back since the start: a stage never ends before it began. */
export async function markFinished(trx: Trx, shopId: string, stageIds: string[], at: Date): Promise<void> {
  await trx('stage')
    .where({ shop_id: shopId })
    .whereIn('id', stageIds)
    .update({ state: 'done', finished_at: trx.raw('greatest(started_at, ?)', [at]) })
    .increment('version', 1);
  await markBookings(trx, shopId, stageIds, 'done');
}

async function markBookings(trx: Trx, shopId: string, stageIds: string[], state: 'running' | 'done'): Promise<void> {
  await trx('booking')
    .where({ shop_id: shopId })
    .whereIn('stage_id', stageIds)
    .whereNot({ state: 'cancelled' })
    .update({ state })
    .increment('version', 1);
}

/** The jobs among these that have no stage left to do. */
export async function jobsWithoutWork(trx: Trx, shopId: string, jobIds: string[]): Promise<string[]> {
  const { rows } = await trx.raw<{ rows: { id: string }[] }>(
    `select j.id from job j
     where j.shop_id = ? and j.id = any (?) and not exists (
       select from stage s where s.shop_id = j.shop_id and s.job_id = j.id and s.state <> 'done')`,
    [shopId, jobIds],
  );
  return rows.map((row) => row.id);
}
