import type { SheetBody, Way } from '#contracts/sheets.ts';
import type { Trx } from './in-shop.ts';

export type NamingSheet = { id: string; name: string; version: number; body: SheetBody };

/** Process sheets in use whose newest version names the coating, by name. */
export async function sheetsNaming(trx: Trx, shopId: string, coatingId: string): Promise<NamingSheet[]> {
  const { rows } = await trx.raw<{ rows: NamingSheet[] }>(
    `select p.id, p.name, p.version, v.body
     from process_sheet p
     join process_sheet_version v on v.shop_id = p.shop_id and v.process_sheet_id = p.id and v.version = p.version
     where p.shop_id = :shopId and p.retired_at is null
       and v.body -> 'stages' @> jsonb_build_array(jsonb_build_object('coatingId', :coatingId::text))
     order by p.name`,
    { shopId, coatingId },
  );
  return rows;
}

export type NamingJob = {
  id: string;
  number: number;
  title: string;
  /** All of them, in order: a gap comes from the coating of a stage before. */
  stages: {
    id: string;
    title: string;
    coatingId: string | null;
    state: 'waiting' | 'running' | 'done';
    booked: boolean;
    ways: Way[];
  }[];
};

/** Open jobs with a stage of the coating and a stage that has not begun, by number. */
export async function jobsNaming(trx: Trx, shopId: string, coatingId: string): Promise<NamingJob[]> {
  const { rows } = await trx.raw<{ rows: NamingJob[] }>(
    `select j.id, j.number, j.title,
       json_agg(json_build_object('id', s.id, 'title', s.title, 'coatingId', s.coating_id, 'state', s.state, 'ways', s.ways,
         'booked', exists (select from booking b where b.shop_id = s.shop_id and b.stage_id = s.id
                           and b.state <> 'cancelled')) order by s.position) as stages
     from job j join stage s on s.shop_id = j.shop_id and s.job_id = j.id
     where j.shop_id = :shopId and j.state = 'open' and j.id in (
       select job_id from stage where shop_id = :shopId and coating_id = :coatingId)
     group by j.shop_id, j.id
     having bool_or(s.state = 'waiting')
     order by j.number`,
    { shopId, coatingId },
  );
  return rows;
}

/** Holds the stages of these jobs and then the jobs, in the order of locks.ts. */
export async function lockJobsWithStages(trx: Trx, shopId: string, jobIds: string[]): Promise<void> {
  const inJobs = trx('stage').where({ shop_id: shopId }).whereIn('job_id', jobIds);
  await inJobs.orderBy('id').forNoKeyUpdate().select('id');
  await trx('job').where({ shop_id: shopId }).whereIn('id', jobIds).orderBy('id').forNoKeyUpdate().select('id');
}

/** A stage's ways anew; whoever looked at the stage before has an old version of it. */
export async function setWays(trx: Trx, shopId: string, stageId: string, ways: Way[]): Promise<void> {
  await trx('stage')
    .where({ shop_id: shopId, id: stageId })
    .update({ ways: JSON.stringify(ways) })
    .increment('version', 1);
}
