import type { TraceVerdict } from '#contracts/traces.ts';
import type { Trx } from './in-shop.ts';

export type TraceRow = {
  id: string;
  stageId: string;
  fileName: string;
  at: Date;
  by: string | null;
  coatingId: string | null;
  coatingName: string | null;
  verdict: TraceVerdict;
  curve: [number, number][];
};

const traces = (trx: Trx, shopId: string) =>
  trx('bake_trace')
    .leftJoin('account', 'account.id', 'bake_trace.created_by')
    .leftJoin('coating', (on) =>
      on.on('coating.shop_id', 'bake_trace.shop_id').andOn('coating.id', 'bake_trace.coating_id'),
    )
    .where({ 'bake_trace.shop_id': shopId })
    .select<TraceRow[]>({
      id: 'bake_trace.id',
      stageId: 'bake_trace.stage_id',
      fileName: 'file_name',
      at: 'bake_trace.created_at',
      by: 'account.name',
      coatingId: 'bake_trace.coating_id',
      coatingName: 'coating.name',
      verdict: 'verdict',
      curve: 'curve',
    });

/** Those of a job's stages that were not taken off, in the order in which they came. */
export const tracesOfJob = (trx: Trx, shopId: string, jobId: string): Promise<TraceRow[]> =>
  traces(trx, shopId)
    .join('stage', (on) => on.on('stage.shop_id', 'bake_trace.shop_id').andOn('stage.id', 'bake_trace.stage_id'))
    .andWhere({ 'stage.job_id': jobId })
    .whereNull('removed_at')
    .orderBy(['bake_trace.created_at', 'bake_trace.id']);

/** Also where it was taken off. */
export const findTrace = async (trx: Trx, shopId: string, id: string): Promise<TraceRow | undefined> =>
  (await traces(trx, shopId).andWhere({ 'bake_trace.id': id }))[0];

export async function readTraceFile(trx: Trx, shopId: string, id: string): Promise<Buffer | undefined> {
  const row = await trx('bake_trace').where({ shop_id: shopId, id }).first<{ file: Buffer } | undefined>('file');
  return row?.file;
}

type NewTrace = Pick<TraceRow, 'id' | 'stageId' | 'fileName' | 'at' | 'coatingId' | 'verdict' | 'curve'> & {
  file: Buffer;
  settings: object;
  points: object[];
  accountId: string;
};

/** False where the id is there already. */
export async function insertTrace(trx: Trx, shopId: string, trace: NewTrace): Promise<boolean> {
  const made = await trx('bake_trace')
    .insert({
      shop_id: shopId,
      id: trace.id,
      stage_id: trace.stageId,
      file_name: trace.fileName,
      file: trace.file,
      settings: JSON.stringify(trace.settings),
      coating_id: trace.coatingId,
      points: JSON.stringify(trace.points),
      verdict: JSON.stringify(trace.verdict),
      curve: JSON.stringify(trace.curve),
      created_by: trace.accountId,
      created_at: trace.at,
    })
    .onConflict(['shop_id', 'id'])
    .ignore()
    .returning('id');
  return made.length === 1;
}

/** False where it is so already. */
export async function setTraceRemoved(trx: Trx, shopId: string, id: string, removedAt: Date | null): Promise<boolean> {
  const query = trx('bake_trace').where({ shop_id: shopId, id });
  const changed = await (removedAt === null ? query.whereNotNull('removed_at') : query.whereNull('removed_at')).update({
    removed_at: removedAt,
  });
  return changed === 1;
}

/** The job and title of a stage; undefined where the shop has no such stage. */
export const stageOfTrace = (
  trx: Trx,
  shopId: string,
  stageId: string,
): Promise<{ jobId: string; title: string } | undefined> =>
  trx('stage')
    .where({ shop_id: shopId, id: stageId })
    .first<{ jobId: string; title: string } | undefined>({ jobId: 'job_id', title: 'title' });
