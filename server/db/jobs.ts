import type { Substrate } from '#contracts/common.ts';
import type { Trx } from './in-shop.ts';

export type PartFacts = { id: string; name: string; substrate: Substrate; units: number };

/** What can be changed after a job is made. */
export type JobFields = {
  title: string;
  vehicle: string;
  colourNote: string;
  notes: string;
  releaseAt: Date;
  promiseAt: Date | null;
  weight: number;
  electric: boolean;
  heatLimitCelsius: number | null;
  heatLimitMinutes: number | null;
};

export type JobFacts = JobFields & {
  id: string;
  number: number;
  version: number;
  /** As stored; whether an open job waits, is planned or runs follows from its stages. */
  state: 'open' | 'done' | 'withdrawn';
  createdAt: Date;
  finishedAt: Date | null;
  sheet: { id: string; name: string; version: number } | null;
  parts: PartFacts[];
};

const columnOf = {
  title: 'title',
  vehicle: 'vehicle',
  colourNote: 'colour_note',
  notes: 'notes',
  releaseAt: 'release_at',
  promiseAt: 'promise_at',
  weight: 'weight',
  electric: 'electric',
  heatLimitCelsius: 'heat_limit_celsius',
  heatLimitMinutes: 'heat_limit_minutes',
} satisfies Record<keyof JobFields, string>;

const toColumns = (fields: Partial<JobFields>): Record<string, unknown> =>
  Object.fromEntries(Object.entries(fields).map(([field, value]) => [columnOf[field as keyof JobFields], value]));

export async function findJob(trx: Trx, shopId: string, jobId: string): Promise<JobFacts | undefined> {
  const { rows } = await trx.raw<{ rows: JobFacts[] }>(
    `select j.id, j.number, j.version, j.title, j.vehicle, j.colour_note as "colourNote", j.notes, j.state,
            j.release_at as "releaseAt", j.promise_at as "promiseAt", j.weight, j.electric,
            j.heat_limit_celsius as "heatLimitCelsius", j.heat_limit_minutes as "heatLimitMinutes",
            j.created_at as "createdAt", j.finished_at as "finishedAt",
            case when p.id is not null
              then json_build_object('id', p.id, 'name', p.name, 'version', v.version) end as sheet,
            coalesce((
              select json_agg(json_build_object('id', part.id, 'name', part.name, 'substrate', part.substrate,
                                                'units', part.units) order by part.position, part.id)
              from part where part.shop_id = j.shop_id and part.job_id = j.id), '[]') as parts
     from job j
     left join process_sheet_version v on v.shop_id = j.shop_id and v.id = j.process_sheet_version_id
     left join process_sheet p on p.shop_id = v.shop_id and p.id = v.process_sheet_id
     where j.shop_id = :shopId and j.id = :jobId`,
    { shopId, jobId },
  );
  return rows[0];
}

/** Holds the job against other writers until the transaction ends. */
export const lockJob = (trx: Trx, shopId: string, jobId: string): Promise<{ id: string } | undefined> =>
  trx('job').where({ shop_id: shopId, id: jobId }).forNoKeyUpdate().first<{ id: string } | undefined>('id');

/** The next job number of the shop. Numbers have no gaps: a transaction that fails gives its number back. */
export async function takeJobNumber(trx: Trx, shopId: string): Promise<number> {
  const rows = await trx('shop')
    .where({ id: shopId })
    .increment('job_number', 1)
    .returning<{ job_number: number }[]>('job_number');
  const row = rows[0];
  if (!row) throw new Error(`Shop ${shopId} is gone.`);
  return row.job_number;
}

export type NewJobRow = JobFields & {
  id: string;
  number: number;
  sheetVersionId: string | null;
  createdBy: string | null;
  parts: PartFacts[];
};

export async function insertJob(trx: Trx, shopId: string, job: NewJobRow): Promise<void> {
  const { id, number, sheetVersionId, createdBy, parts, ...fields } = job;
  await trx('job').insert({
    shop_id: shopId,
    id,
    number,
    process_sheet_version_id: sheetVersionId,
    created_by: createdBy,
    ...toColumns(fields),
  });
  await trx('part').insert(parts.map((part, position) => ({ shop_id: shopId, job_id: id, position, ...part })));
}

/** Writes the fields where the job still has the version that was seen; false where it has not. */
export async function updateJob(
  trx: Trx,
  shopId: string,
  job: { id: string; version: number },
  fields: Partial<JobFields>,
): Promise<boolean> {
  const changed = await trx('job')
    .where({ shop_id: shopId, id: job.id, version: job.version })
    .update({ ...toColumns(fields), version: job.version + 1 });
  return changed === 1;
}

export async function setJobState(
  trx: Trx,
  shopId: string,
  job: { id: string; state: 'done' | 'withdrawn'; finishedAt: Date | null },
): Promise<void> {
  await trx('job')
    .where({ shop_id: shopId, id: job.id })
    .update({ state: job.state, finished_at: job.finishedAt })
    .increment('version', 1);
}

export type HistoryLine = { at: Date; by: string | null; kind: string; detail: Record<string, unknown> };

/** What happened to the job and its stages, newest first, at most the last 200. */
export async function jobHistory(
  trx: Trx,
  shopId: string,
  job: { id: string; createdAt: Date },
): Promise<HistoryLine[]> {
  const { rows } = await trx.raw<{ rows: HistoryLine[] }>(
    `select c.at, account.name as by, c.kind, c.detail
     from change c left join account on account.id = c.account_id
     where c.shop_id = :shopId and c.at >= :since and c.ids @> array[:jobId]::uuid[]
     order by c.seq desc limit 200`,
    { shopId, since: job.createdAt, jobId: job.id },
  );
  return rows;
}

/**
 * What the job was asked to be when it was made: kept in the shop's history, written in the same transaction and so at
 * the same moment (to the microsecond, which a Date would lose).
 */
export async function askedFor(trx: Trx, shopId: string, jobId: string): Promise<Record<string, unknown> | undefined> {
  const { rows } = await trx.raw<{ rows: { detail: Record<string, unknown> }[] }>(
    `select c.detail
     from job j
     join change c on c.shop_id = j.shop_id and c.at = j.created_at and c.kind = 'job-created' and c.ids @> array[j.id]
     where j.shop_id = ? and j.id = ?`,
    [shopId, jobId],
  );
  return rows[0]?.detail;
}
