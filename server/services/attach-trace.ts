import { isDeepStrictEqual } from 'node:util';
import type * as z from 'zod';
import type { PrintedPoint } from '#chemistry/printed-points.ts';
import type { attachTrace as contract, BakeTrace } from '#contracts/traces.ts';
import { findTrace, insertTrace, readTraceFile, stageOfTrace, type TraceRow } from '../db/bake-traces.ts';
import { recordChange } from '../db/changes.ts';
import { everyCoating } from '../db/coatings.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { judgeTrace } from './judge-trace.ts';

type Input = z.output<typeof contract.body>;

export const traceView = ({ at, ...trace }: TraceRow): BakeTrace => ({ ...trace, at: at.toISOString() });

/**
 * Keeps a logger's readings with a stage, judged against the coating's data sheet as it is now. Sent again it is kept once.
 * @throws {Refusal} not-found for a stage of no job here; bad-request with what is wrong; taken where the id is another's.
 */
export async function attachTrace(deps: Deps, actor: Actor, stageId: string, input: Input): Promise<BakeTrace> {
  const { points, stage } = await inShop(deps.db, actor, async (trx) => ({
    stage: await stageOfTrace(trx, actor.shopId, stageId),
    points: await pointsOf(trx, actor.shopId, input),
  }));
  if (!stage) throw notFound();
  const { fileName, earlierMinutes, limitCelsius, hottestCelsius } = input;
  // Outside of a transaction: it takes a while, and holds nobody up.
  const judged = await judgeTrace(input.rows, { points, earlierMinutes, limitCelsius, hottestCelsius });
  return inShop(deps.db, actor, async (trx) => {
    const made = await insertTrace(trx, actor.shopId, {
      ...judged,
      ...{ id: input.id, stageId, fileName, coatingId: input.coatingId, points, at: deps.now() },
      settings: { earlierMinutes, limitCelsius, hottestCelsius },
      accountId: actor.accountId,
    });
    const trace = await findTrace(trx, actor.shopId, input.id);
    if (!trace) throw new Error('The trace that was just kept is not there.');
    if (!made) {
      const file = await readTraceFile(trx, actor.shopId, input.id);
      const isSame = trace.stageId === stageId && isDeepStrictEqual(file, judged.file);
      if (!isSame) throw new Refusal('taken');
      return traceView(trace);
    }
    await recordChange(trx, actor, {
      kind: 'trace-attached',
      ids: [trace.id, stageId, stage.jobId],
      detail: { stages: [stage.title], fileName, cured: judged.verdict.cured },
    });
    return traceView(trace);
  });
}

async function pointsOf(trx: Trx, shopId: string, { coatingId, points }: Input): Promise<PrintedPoint[]> {
  if (coatingId === null) return points;
  const coating = (await everyCoating(trx, shopId)).find(({ id }) => id === coatingId);
  if (!coating)
    throw new Refusal('bad-request', { fields: [{ path: 'body.coatingId', message: 'is no coating of this shop' }] });
  return [coating.sheet.airDry, coating.sheet.bake].flatMap((point) =>
    point ? [{ celsius: point.celsius, minutes: point.minutes }] : [],
  );
}
