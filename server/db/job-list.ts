import type { JobState } from '#contracts/jobs.ts';
import type { Trx } from './in-shop.ts';

export type JobQuery = {
  q?: string | undefined;
  state: 'open' | 'late' | 'all' | JobState;
  sort: string;
  page: number;
  size: number;
};

export type JobListRow = {
  id: string;
  number: number;
  title: string;
  vehicle: string;
  sheetName: string | null;
  state: JobState;
  releaseAt: Date;
  promiseAt: Date | null;
  endsAt: Date | null;
  late: boolean;
  stagesDone: number;
  stagesTotal: number;
  weight: number;
  nextTitle: string | null;
  nextStartsAt: Date | null;
  nextPlaceName: string | null;
};

/**
 * Jobs with what follows from their stages. Running: some work was begun. Planned: every stage that is left has a
 * booking. Late: it ends, or has ended, or must by now have ended, after the promise.
 */
const matched = `
  select judged.* from (
    select j.shop_id, j.id, j.number, j.title, lower(j.title) as title_key, j.vehicle,
           j.process_sheet_version_id, j.release_at, j.promise_at, j.weight, c.done, c.total, ends.at as ends_at,
           case when j.state <> 'open' then j.state
                when c.begun > 0 then 'running'
                when c.settled = c.total then 'planned'
                else 'waiting' end as state,
           (j.state <> 'withdrawn' and coalesce(coalesce(ends.at, :now) > j.promise_at, false)) as late
    from job j
    cross join lateral (
      select count(*)::int as total,
             (count(*) filter (where s.state = 'done'))::int as done,
             (count(*) filter (where s.state <> 'waiting'))::int as begun,
             (count(*) filter (where s.state = 'done' or b.id is not null))::int as settled,
             (array_agg(coalesce(s.finished_at, upper(b.during)) order by s.position desc))[1] as last_end
      from stage s
      left join booking b on b.shop_id = s.shop_id and b.stage_id = s.id and b.state <> 'cancelled'
      where s.shop_id = j.shop_id and s.job_id = j.id
    ) c
    cross join lateral (
      select case when j.state = 'done' then coalesce(j.finished_at, c.last_end)
                  when j.state = 'open' and c.settled = c.total then c.last_end end as at
    ) ends
    where j.shop_id = :shopId
      and (:stored::text is null or j.state = :stored)
      and (:pattern::text is null or j.title ilike :pattern or j.vehicle ilike :pattern or j.number::text like :digits)
  ) judged
  where :derived::text is null or judged.state = :derived or (:derived = 'late' and judged.late)`;

const orders = {
  promise: 'promise_at',
  number: 'number',
  title: 'title_key',
  release: 'release_at',
} as const;

const likeLiteral = (text: string): string => text.replace(/[\\%_]/g, '\\$&');

function bindings(shopId: string, query: JobQuery, now: Date) {
  const text = query.q === undefined || query.q === '' ? null : query.q;
  const isStored = query.state === 'done' || query.state === 'withdrawn';
  return {
    shopId,
    now,
    stored: query.state === 'all' ? null : isStored ? query.state : 'open',
    derived: query.state === 'all' || query.state === 'open' || isStored ? null : query.state,
    pattern: text === null ? null : `%${likeLiteral(text)}%`,
    digits: text === null ? null : `${likeLiteral(text.replace(/^#/, ''))}%`,
  };
}

/** A page of the shop's jobs, found, derived, sorted and cut in one statement. */
export async function listJobs(
  trx: Trx,
  shopId: string,
  query: JobQuery,
  now: Date,
): Promise<{ rows: JobListRow[]; total: number }> {
  const bound = bindings(shopId, query, now);
  const column = orders[query.sort.replace(/^-/, '') as keyof typeof orders];
  const order = [
    { column: `page.${column}`, order: query.sort.startsWith('-') ? 'desc' : 'asc', nulls: 'last' },
    { column: 'page.number', order: 'asc' },
  ] as const;
  const page = trx('matched as page')
    .select('page.*', trx.raw('(count(*) over ())::int as total_rows'))
    .orderBy([...order])
    .limit(query.size)
    .offset((query.page - 1) * query.size)
    .as('page');
  const rows = await trx
    .with('matched', trx.raw(matched, bound))
    .from(page)
    .joinRaw(
      `left join process_sheet_version v on v.shop_id = page.shop_id and v.id = page.process_sheet_version_id
       left join process_sheet sheet on sheet.shop_id = v.shop_id and sheet.id = v.process_sheet_id
       left join lateral (
         select s.title, lower(b.during) as starts_at, place.name as place_name
         from stage s
         left join booking b on b.shop_id = s.shop_id and b.stage_id = s.id and b.state <> 'cancelled'
         left join place on place.shop_id = b.shop_id and place.id = b.place_id
         where s.shop_id = page.shop_id and s.job_id = page.id and s.state <> 'done'
           and page.state in ('waiting', 'planned', 'running')
         order by s.position limit 1
       ) next on true`,
    )
    .orderBy([...order])
    .select<(JobListRow & { total: number })[]>({
      id: 'page.id',
      number: 'page.number',
      title: 'page.title',
      vehicle: 'page.vehicle',
      sheetName: 'sheet.name',
      state: 'page.state',
      releaseAt: 'page.release_at',
      promiseAt: 'page.promise_at',
      endsAt: 'page.ends_at',
      late: 'page.late',
      stagesDone: 'page.done',
      stagesTotal: 'page.total',
      weight: 'page.weight',
      nextTitle: 'next.title',
      nextStartsAt: 'next.starts_at',
      nextPlaceName: 'next.place_name',
      total: 'page.total_rows',
    });
  // A page past the end has no row that could tell how many there are.
  if (rows.length > 0 || query.page === 1) return { rows, total: rows[0]?.total ?? 0 };
  const { total } = await listJobs(trx, shopId, { ...query, page: 1, size: 1 }, now);
  return { rows: [], total };
}
