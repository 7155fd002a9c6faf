import type { Way } from '#contracts/sheets.ts';
import type { Trx } from './in-shop.ts';

export type UseRow = {
  placeId: string;
  personId: string | null;
  from: Date;
  to: Date;
  phases: [number, number][];
  way: Way;
  startedAt: Date | null;
  finishedAt: Date | null;
  /** The stage after it in the job, as far as the hold on the place depends on it; null where none is booked. */
  next: { startsAt: string; stay: boolean; settle: number } | null;
};

/** What was or is booked in a stretch of time, by the plan or by what happened, a few days wider on either side. */
export async function bookingsForUse(
  trx: Trx,
  shopId: string,
  range: { from: Date; to: Date; now: Date },
): Promise<UseRow[]> {
  const { rows } = await trx.raw<{ rows: UseRow[] }>(
    `select b.place_id as "placeId", b.person_id as "personId", lower(b.during) as "from", upper(b.during) as "to",
            b.phases, (select w from jsonb_array_elements(s.ways) w where w ->> 'id' = b.way) as way,
            s.started_at as "startedAt", s.finished_at as "finishedAt", next.facts as next
     from booking b
     join stage s on s.shop_id = b.shop_id and s.id = b.stage_id
     left join lateral (
       select case when nb.id is not null then json_build_object(
                'startsAt', coalesce(n.started_at, lower(nb.during)), 'stay', (w -> 'stay')::boolean,
                'settle', (w #> '{gap,settle}')::int) end as facts
       from stage n
       left join booking nb on nb.shop_id = n.shop_id and nb.stage_id = n.id and nb.state <> 'cancelled'
       left join jsonb_array_elements(n.ways) w on w ->> 'id' = nb.way
       where n.shop_id = s.shop_id and n.job_id = s.job_id and n.position > s.position
       order by n.position limit 1
     ) next on true
     where b.shop_id = :shopId and b.state <> 'cancelled'
       and (b.during && tstzrange(:from::timestamptz - interval '7 days', :to::timestamptz + interval '7 days')
            or (s.started_at < :to and coalesce(s.finished_at, :now) > :from))
     order by lower(b.during), b.id`,
    { shopId, ...range },
  );
  return rows;
}
