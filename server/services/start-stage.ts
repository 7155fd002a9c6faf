import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { keepOverruled, markStarted, type TappedStage } from '../db/stages.ts';
import { tryAgain } from '../db/try-again.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';
import type { SprayAir } from '#contracts/bench.ts';
import { passSprayGate } from './spray-gate.ts';
import { lockForTap, refuseStale, tapRefused } from './tap-stage.ts';

/**
 * Work on a stage begins now, by the server's clock, and on all of its load that is ready. A second tap finds it begun
 * and changes nothing.
 * @throws {Refusal} not-found, forbidden, stale, or refused with what is in the way.
 */
export function startStage(
  deps: Deps,
  actor: Actor,
  stageId: string,
  { version, overrule }: { version: number; overrule?: string | undefined },
): Promise<{ version: number; air: SprayAir | null }> {
  return tryAgain(() =>
    inShop(deps.db, actor, async (trx) => {
      const { stage, load } = await lockForTap(trx, actor, stageId);
      if (stage.state !== 'waiting') return { version: stage.version, air: null };
      refuseStale(stage, version);
      refuseUnready(stage);
      const started = load.filter(isReady);
      const ids = started.map((member) => member.id);
      const { air, overruled } = await passSprayGate(trx, actor, { started, overrule, now: deps.now() });
      await markStarted(trx, actor.shopId, ids, deps.now());
      if (overruled) await keepOverruled(trx, actor.shopId, ids, overruled);
      await recordChange(trx, actor, {
        kind: 'stage-started',
        ids: [...ids, ...new Set(started.map((member) => member.jobId))],
        detail: { stages: started.map((member) => member.title), ...(overruled ? { overruled } : {}) },
      });
      return { version: stage.version + 1, air };
    }),
  );
}

const isReady = (stage: TappedStage): boolean =>
  stage.state === 'waiting' &&
  stage.jobState === 'open' &&
  stage.bookingId !== null &&
  (stage.previousState === null || stage.previousState === 'done');

function refuseUnready(stage: TappedStage): void {
  if (isReady(stage)) return;
  if (stage.jobState === 'withdrawn') throw tapRefused('job-withdrawn', stage);
  if (stage.bookingId === null) throw tapRefused('not-booked', stage);
  throw tapRefused('previous-not-done', stage, { id: stage.previousId ?? '', name: stage.previousTitle ?? '' });
}
