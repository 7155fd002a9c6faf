import type { PlanRun } from '#contracts/day.ts';
import type { Way } from '#contracts/sheets.ts';
import type { PlanAir } from './air.ts';
import type { Trx } from './in-shop.ts';
import type { StageState } from './stages.ts';

export type ShownPlan = 'posted' | 'draft';
type Spot = { placeId: string; personId: string | null; from: Date };

/** A stage of a job that has something in the range, as the shown plan has it; null where that plan does not book it. */
export type DayStage = {
  id: string;
  jobId: string;
  jobNumber: number;
  jobTitle: string;
  partNames: string;
  promiseAt: Date | null;
  kind: string;
  title: string;
  state: StageState;
  finishedAt: Date | null;
  booked: (Spot & { to: Date; lampIds: string[]; loadId: string; phases: [number, number][]; pinned: boolean }) | null;
  way: Way | null;
  /** Where the posted plan has it. */
  posted: Spot | null;
};

type FlatDayStage = Omit<DayStage, 'booked' | 'posted'> & {
  placeId: string | null;
  personId: string | null;
  from: Date;
  to: Date;
  lampIds: string[];
  loadId: string;
  phases: [number, number][];
  pinned: boolean;
  postedPlaceId: string | null;
  postedPersonId: string | null;
  postedFrom: Date;
};

/** Whole jobs, in order of their stages: windows, holds and lateness reach beyond the range. One statement. */
export async function dayStages(
  trx: Trx,
  shopId: string,
  asked: { from: Date; to: Date; plan: ShownPlan },
): Promise<DayStage[]> {
  const { rows } = await trx.raw<{ rows: FlatDayStage[] }>(DAY_STAGES, { shopId, ...asked });
  return rows.map((row) => {
    const { placeId, personId, from, to, lampIds, loadId, phases, pinned, ...rest } = row;
    const { postedPlaceId, postedPersonId, postedFrom, ...stage } = rest;
    return {
      ...stage,
      booked: placeId === null ? null : { placeId, personId, from, to, lampIds, loadId, phases, pinned },
      posted: postedPlaceId === null ? null : { placeId: postedPlaceId, personId: postedPersonId, from: postedFrom },
    };
  });
}

// What runs or is done stands in every plan as it was posted; a draft speaks of the rest.
const DAY_STAGES = `
  with open_draft as (
    select id from draft where shop_id = :shopId and state = 'open' and :plan = 'draft'
  ), touched as materialized (
    select s.job_id
    from booking b join stage s on s.shop_id = b.shop_id and s.id = b.stage_id
    where b.shop_id = :shopId and b.state <> 'cancelled' and b.during && tstzrange(:from, :to)
    union
    select s.job_id
    from draft_item d
    join open_draft on open_draft.id = d.draft_id
    join stage s on s.shop_id = d.shop_id and s.id = d.stage_id
    where d.shop_id = :shopId and d.during && tstzrange(:from, :to)
  ), shown_job as materialized (
    select j.shop_id, j.id, j.number, j.title, j.promise_at,
           coalesce((select string_agg(part.name, ', ' order by part.position, part.id) from part
                     where part.shop_id = j.shop_id and part.job_id = j.id), '') as part_names
    from touched join job j on j.shop_id = :shopId and j.id = touched.job_id
  )
  select s.id, j.id as "jobId", j.number as "jobNumber", j.title as "jobTitle", j.part_names as "partNames",
         j.promise_at as "promiseAt", s.kind, s.title, s.state, s.finished_at as "finishedAt",
         shown.place_id as "placeId", shown.person_id as "personId", lower(shown.during) as "from",
         upper(shown.during) as "to", shown.lamp_ids as "lampIds", shown.load_id as "loadId", shown.phases,
         shown.pinned, (select w from jsonb_array_elements(s.ways) w where w ->> 'id' = shown.way) as way,
         b.place_id as "postedPlaceId", b.person_id as "postedPersonId", lower(b.during) as "postedFrom"
  from shown_job j
  join stage s on s.shop_id = j.shop_id and s.job_id = j.id
  left join booking b on b.shop_id = s.shop_id and b.stage_id = s.id and b.state <> 'cancelled'
  left join open_draft on true
  left join lateral (
    select b.way, b.place_id, b.person_id, b.during, b.lamp_ids, b.load_id, b.phases, b.pinned
    where b.id is not null and (open_draft.id is null or b.state in ('running', 'done'))
    union all
    select d.way, d.place_id, d.person_id, d.during, d.lamp_ids, d.load_id, d.phases, d.pinned
    from draft_item d
    where d.shop_id = s.shop_id and d.draft_id = open_draft.id and d.stage_id = s.id
      and coalesce(b.state not in ('running', 'done'), true)
  ) shown on true
  order by j.number, s.position`;

export type UnplacedRow = {
  jobId: string;
  jobNumber: number;
  jobTitle: string;
  stageTitle: string | null;
  reason: string | null;
};

/**
 * Open jobs of which the shown plan does not book every stage that is left, with what the planner said when it was last
 * asked: in the open draft, or else in the one that was posted last.
 */
export async function unplacedJobs(trx: Trx, shopId: string, plan: ShownPlan): Promise<UnplacedRow[]> {
  const { rows } = await trx.raw<{ rows: UnplacedRow[] }>(
    `with open_draft as (
       select id from draft where shop_id = :shopId and state = 'open' and :plan = 'draft'
     ), said as (
       select unplaced from draft
       where shop_id = :shopId and state in ('open', 'posted')
       order by (state = 'open') desc, updated_at desc limit 1
     ), reason as materialized (
       select (r ->> 'jobId')::uuid as job_id, (r ->> 'stageId')::uuid as stage_id, r ->> 'reason' as text
       from said cross join jsonb_array_elements(said.unplaced) r
     )
     select j.id as "jobId", j.number as "jobNumber", j.title as "jobTitle",
            coalesce(named.title, first.title) as "stageTitle", reason.text as reason
     from job j
     join lateral (
       select s.title
       from stage s
       left join booking b on b.shop_id = s.shop_id and b.stage_id = s.id and b.state <> 'cancelled'
       left join open_draft on true
       left join draft_item d on d.shop_id = s.shop_id and d.draft_id = open_draft.id and d.stage_id = s.id
       where s.shop_id = j.shop_id and s.job_id = j.id and s.state <> 'done' and d.id is null
         and (b.id is null or (open_draft.id is not null and b.state = 'planned'))
       order by s.position limit 1
     ) first on true
     left join reason on reason.job_id = j.id
     left join stage named on named.shop_id = j.shop_id and named.id = reason.stage_id
     where j.shop_id = :shopId and j.state = 'open'
     order by j.promise_at nulls last, j.number`,
    { shopId, plan },
  );
  return rows;
}

type Json<T> = { [K in keyof T]: T[K] extends Date | null ? string | Extract<T[K], null> : T[K] };

/** Moments are as PostgreSQL writes them in JSON. */
export type PlanHeads = {
  posted: { at: string | null; by: string | null; air: PlanAir | null } | null;
  draft: Json<{
    id: string;
    version: number;
    changes: number;
    late: number;
    updatedAt: Date;
    updatedBy: string | null;
    planNumber: number;
  }> | null;
  run: PlanRun | null;
};

/** What stands above the plan: who posted, how the draft differs, how the last run went. One statement. */
export async function planHeads(trx: Trx, shopId: string): Promise<PlanHeads> {
  const { rows } = await trx.raw<{ rows: PlanHeads[] }>(HEADS, { shopId });
  return rows[0] ?? { posted: null, draft: null, run: null };
}

const HEADS = `
  select
    (select json_build_object('at', p.posted_at, 'by', account.name, 'air', p.air)
     from shop
     join posted_plan p on p.shop_id = shop.id and p.number = shop.plan_number
     left join account on account.id = p.posted_by
     where shop.id = :shopId) as posted,
    (select json_build_object('id', r.id, 'state', r.state, 'scope', r.scope, 'progress', r.progress,
              'failure', r.failure, 'seconds', r.seconds, 'startedAt', r.started_at, 'finishedAt', r.finished_at)
     from plan_run r where r.shop_id = :shopId order by r.created_at desc, r.id desc limit 1) as run,
    (select json_build_object('id', draft.id, 'version', draft.version, 'planNumber', draft.plan_number,
              'updatedAt', draft.updated_at, 'updatedBy', account.name,
              'changes', (
                select count(*)
                from (select d.stage_id, d.way, d.place_id, d.person_id, lower(d.during) as starts
                      from draft_item d
                      join stage s on s.shop_id = d.shop_id and s.id = d.stage_id and s.state = 'waiting'
                      where d.shop_id = :shopId and d.draft_id = draft.id) d
                full join (select b.stage_id, b.way, b.place_id, b.person_id, lower(b.during) as starts
                           from booking b where b.shop_id = :shopId and b.state = 'planned') b using (stage_id)
                where (d.way, d.place_id, d.person_id, d.starts) is distinct from (b.way, b.place_id, b.person_id, b.starts)),
              'late', (
                select count(*)
                from (select s.job_id, (array_agg(upper(d.during) order by s.position desc))[1] as ends_at
                      from draft_item d join stage s on s.shop_id = d.shop_id and s.id = d.stage_id
                      where d.shop_id = :shopId and d.draft_id = draft.id group by s.job_id) ends
                join job j on j.shop_id = :shopId and j.id = ends.job_id
                where j.state = 'open' and ends.ends_at > j.promise_at))
     from draft left join account on account.id = draft.updated_by
     where draft.shop_id = :shopId and draft.state = 'open') as draft`;
