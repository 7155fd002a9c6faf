import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { setJobState } from '../db/jobs.ts';
import { jobsWithoutWork, markFinished } from '../db/stages.ts';
import { tryAgain } from '../db/try-again.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';
import { lockForTap, refuseStale, tapRefused } from './tap-stage.ts';

/**
 * A stage is done now, by the server's clock, and all of its load that runs. With its last stage the job is done too.
 * A second tap finds it done and changes nothing.
 * @throws {Refusal} not-found, forbidden, stale, or refused where it was never started.
 */
export function finishStage(deps: Deps, actor: Actor, stageId: string, version: number): Promise<{ version: number }> {
  return tryAgain(() =>
    inShop(deps.db, actor, async (trx) => {
      const { stage, load } = await lockForTap(trx, actor, stageId);
      if (stage.state === 'done') return { version: stage.version };
      if (stage.state === 'waiting') throw tapRefused('not-started', stage);
      refuseStale(stage, version);
      const now = deps.now();
      const finished = load.filter((member) => member.state === 'running');
      const ids = finished.map((member) => member.id);
      await markFinished(trx, actor.shopId, ids, now);
      const jobIds = [...new Set(finished.map((member) => member.jobId))];
      const done = await jobsWithoutWork(trx, actor.shopId, jobIds);
      for (const id of done) await setJobState(trx, actor.shopId, { id, state: 'done', finishedAt: now });
      await recordChange(trx, actor, {
        kind: 'stage-finished',
        ids: [...ids, ...jobIds],
        detail: { stages: finished.map((member) => member.title), jobsDone: done },
      });
      return { version: stage.version + 1 };
    }),
  );
}
