import { promisify } from 'node:util';
import { gunzip } from 'node:zlib';
import { MOST_TRACE_BYTES, type BakeTrace } from '#contracts/traces.ts';
import { findTrace, readTraceFile, setTraceRemoved, stageOfTrace, tracesOfJob } from '../db/bake-traces.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { findJob } from '../db/jobs.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { traceView } from './attach-trace.ts';

const unpack = promisify(gunzip);

/** @throws {Refusal} not-found for a job of another shop. */
export const listTraces = (deps: Deps, actor: Actor, jobId: string): Promise<{ traces: BakeTrace[] }> =>
  inShop(deps.db, actor, async (trx) => {
    if (!(await findJob(trx, actor.shopId, jobId))) throw notFound();
    return { traces: (await tracesOfJob(trx, actor.shopId, jobId)).map(traceView) };
  });

/** @throws {Refusal} not-found */
export async function readTrace(deps: Deps, actor: Actor, id: string): Promise<{ trace: BakeTrace; csv: string }> {
  const found = await inShop(deps.db, actor, async (trx) => ({
    trace: await findTrace(trx, actor.shopId, id),
    file: await readTraceFile(trx, actor.shopId, id),
  }));
  if (!found.trace || !found.file) throw notFound();
  const rows = await unpack(found.file, { maxOutputLength: MOST_TRACE_BYTES });
  return { trace: traceView(found.trace), csv: `time min,metal C\n${rows.toString('latin1')}\n` };
}

/** Takes a trace off its stage, or puts it back. @throws {Refusal} not-found */
export const removeTrace = (deps: Deps, actor: Actor, id: string, removed: boolean): Promise<BakeTrace> =>
  inShop(deps.db, actor, async (trx) => {
    const changed = await setTraceRemoved(trx, actor.shopId, id, removed ? deps.now() : null);
    const trace = await findTrace(trx, actor.shopId, id);
    const stage = trace && (await stageOfTrace(trx, actor.shopId, trace.stageId));
    if (!trace || !stage) throw notFound();
    if (changed)
      await recordChange(trx, actor, {
        kind: removed ? 'trace-removed' : 'trace-attached',
        ids: [id, trace.stageId, stage.jobId],
        detail: { stages: [stage.title], fileName: trace.fileName },
      });
    return traceView(trace);
  });
