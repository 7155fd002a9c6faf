import type { Way } from '#contracts/sheets.ts';
import type { StageState } from './stages.ts';
import type { Trx } from './in-shop.ts';

export type BenchRow = {
  id: string;
  version: number;
  jobId: string;
  jobNumber: number;
  jobTitle: string;
  vehicle: string;
  partNames: string;
  colourNote: string;
  kind: string;
  title: string;
  way: Way;
  placeName: string;
  zoneId: string | null;
  lampNames: string[];
  from: Date;
  to: Date;
  phases: [number, number][];
  state: StageState;
  startedAt: Date | null;
  finishedAt: Date | null;
  previousState: StageState | null;
  previousEnd: Date | null;
  sharedWith: string[];
};

export type BenchQuery = { personId: string; from: Date; to: Date; withOverdue: boolean };

/**
 * What a person has to do in a stretch of time, in order: own bookings, whatever runs, and on the present day also what
 * should have been begun before. Work without hands (a cure, a drying night) stands on the bench of whoever comes
 * before it in the job and of whoever comes after, since one of the two has to see it begun and done.
 */
export async function benchStages(trx: Trx, shopId: string, query: BenchQuery): Promise<BenchRow[]> {
  const { rows } = await trx.raw<{ rows: BenchRow[] }>(BENCH, { shopId, ...query });
  return rows;
}

const BENCH = `
  select s.id, s.version, j.id as "jobId", j.number as "jobNumber", j.title as "jobTitle", j.vehicle,
         coalesce((select string_agg(part.name, ', ' order by part.position, part.id) from part
                   where part.shop_id = j.shop_id and part.job_id = j.id), '') as "partNames",
         j.colour_note as "colourNote", s.kind, s.title,
         (select w from jsonb_array_elements(s.ways) w where w ->> 'id' = b.way) as way,
         place.name as "placeName", place.zone_id as "zoneId",
         array(select lamp.name from lamp where lamp.shop_id = b.shop_id and lamp.id = any (b.lamp_ids)
               order by lamp.position, lamp.name) as "lampNames",
         lower(b.during) as "from", upper(b.during) as "to", b.phases,
         s.state, s.started_at as "startedAt", s.finished_at as "finishedAt",
         previous.state as "previousState", previous.ends_at as "previousEnd",
         array(select other_job.title
               from booking other
               join stage other_stage on other_stage.shop_id = other.shop_id and other_stage.id = other.stage_id
               join job other_job on other_job.shop_id = other.shop_id and other_job.id = other_stage.job_id
               where other.shop_id = b.shop_id and other.place_id = b.place_id and other.load_id = b.load_id
                 and other.during && b.during and other.id <> b.id and other.state <> 'cancelled'
               order by other_job.number) as "sharedWith"
  from booking b
  join stage s on s.shop_id = b.shop_id and s.id = b.stage_id
  join job j on j.shop_id = s.shop_id and j.id = s.job_id and j.state <> 'withdrawn'
  join place on place.shop_id = b.shop_id and place.id = b.place_id
  left join lateral (
    select p.state, coalesce(p.finished_at, upper(pb.during)) as ends_at
    from stage p
    left join booking pb on pb.shop_id = p.shop_id and pb.stage_id = p.id and pb.state <> 'cancelled'
    where p.shop_id = s.shop_id and p.job_id = s.job_id and p.position < s.position
    order by p.position desc limit 1
  ) previous on true
  where b.shop_id = :shopId and b.state <> 'cancelled'
    and (b.during && tstzrange(:from, :to) or s.state = 'running'
         or (:withOverdue and s.state = 'waiting' and upper(b.during) <= :from))
    and (b.person_id = :personId
         or (b.person_id is null and (
           (select eb.person_id from stage e
            join booking eb on eb.shop_id = e.shop_id and eb.stage_id = e.id and eb.state <> 'cancelled'
            where e.shop_id = s.shop_id and e.job_id = s.job_id and e.position < s.position
              and eb.person_id is not null
            order by e.position desc limit 1) = :personId
           or (select lb.person_id from stage l
               join booking lb on lb.shop_id = l.shop_id and lb.stage_id = l.id and lb.state <> 'cancelled'
               where l.shop_id = s.shop_id and l.job_id = s.job_id and l.position > s.position
                 and lb.person_id is not null
               order by l.position limit 1) = :personId)))
  order by lower(b.during), j.number, s.position`;
