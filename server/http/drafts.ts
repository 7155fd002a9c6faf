import * as contract from '#contracts/drafts.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import { compareDraft } from '../services/compare-draft.ts';
import { dropDraft } from '../services/drop-draft.ts';
import { moveStage } from '../services/move-stage.ts';
import { openDraft } from '../services/open-draft.ts';
import { postDraft } from '../services/post-draft.ts';
import { readPlanRun } from '../services/read-plan-run.ts';
import { startPlanRun } from '../services/start-plan-run.ts';
import { stopPlanRun } from '../services/stop-plan-run.ts';
import type { Routes } from './route.ts';

export function draftRoutes(routes: Routes, deps: Deps): void {
  routes.shop(contract.openDraft, may.plan, ({ actor }) => openDraft(deps, actor));
  routes.shop(contract.dropDraft, may.plan, ({ actor, body }) => dropDraft(deps, actor, body.version));
  routes.shop(contract.moveStage, may.plan, ({ actor, params, body }) =>
    moveStage(deps, actor, { ...body, stageId: params.stageId, start: new Date(body.start) }),
  );
  routes.shop(contract.compareDraft, may.plan, ({ actor }) => compareDraft(deps, actor));
  routes.shop(contract.postDraft, may.plan, ({ actor, body }) => postDraft(deps, actor, body.version));
  routes.shop(contract.startPlanRun, may.plan, ({ actor, body }) => startPlanRun(deps, actor, body));
  routes.shop(contract.readPlanRun, may.seeShop, ({ actor, params }) => readPlanRun(deps, actor, params.runId));
  routes.shop(contract.stopPlanRun, may.plan, ({ actor, params }) => stopPlanRun(deps, actor, params.runId));
}
