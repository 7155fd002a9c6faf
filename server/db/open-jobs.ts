import type { Substrate } from '#contracts/common.ts';
import type { Way } from '#contracts/sheets.ts';
import type { Trx } from './in-shop.ts';

export type OpenStage = {
  id: string;
  position: number;
  kind: string;
  title: string;
  /** What the stage puts on or cures, if any. */
  coatingId: string | null;
  ways: Way[];
  state: 'waiting' | 'running' | 'done';
  startedAt: Date | null;
  finishedAt: Date | null;
  version: number;
};
export type OpenJob = {
  id: string;
  number: number;
  title: string;
  releaseAt: Date;
  promiseAt: Date | null;
  weight: number;
  electric: boolean;
  heatLimitCelsius: number | null;
  heatLimitMinutes: number | null;
  parts: { name: string; substrate: Substrate; units: number }[];
  /** In order. */
  stages: OpenStage[];
};

type Json<T> = { [K in keyof T]: Date extends T[K] ? Exclude<T[K], Date> | string : T[K] };
type Row = { body: Omit<Json<OpenJob>, 'stages'> & { stages: Json<OpenStage>[] } };

/** Jobs that are neither done nor withdrawn, whole, in one statement; the oldest number first. */
export async function loadOpenJobs(trx: Trx, shopId: string): Promise<OpenJob[]> {
  const answer = await trx.raw<{ rows: Row[] }>(OPEN_JOBS, { shopId });
  return answer.rows.map(({ body }) => ({
    ...body,
    releaseAt: new Date(body.releaseAt),
    promiseAt: instant(body.promiseAt),
    stages: body.stages.map((stage) => ({
      ...stage,
      startedAt: instant(stage.startedAt),
      finishedAt: instant(stage.finishedAt),
    })),
  }));
}

const instant = (text: string | null): Date | null => (text === null ? null : new Date(text));

const OPEN_JOBS = `
  select json_build_object('id', job.id, 'number', job.number, 'title', job.title, 'releaseAt', job.release_at,
      'promiseAt', job.promise_at, 'weight', job.weight, 'electric', job.electric,
      'heatLimitCelsius', job.heat_limit_celsius, 'heatLimitMinutes', job.heat_limit_minutes,
      'parts', coalesce(parts.list, '[]'), 'stages', coalesce(stages.list, '[]')) as body
    from job
    left join (
      select job_id, json_agg(json_build_object('name', name, 'substrate', substrate, 'units', units)
          order by position, id) as list
        from part where shop_id = :shopId group by job_id
    ) parts on parts.job_id = job.id
    left join (
      select job_id, json_agg(json_build_object('id', id, 'position', position, 'kind', kind, 'title', title,
          'coatingId', coating_id, 'ways', ways, 'state', state, 'startedAt', started_at, 'finishedAt', finished_at, 'version', version)
          order by position) as list
        from stage where shop_id = :shopId group by job_id
    ) stages on stages.job_id = job.id
    where job.shop_id = :shopId and job.state = 'open'
    order by job.number`;
