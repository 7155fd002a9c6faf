import { attachTrace, listTraces, readTrace, removeTrace } from '#contracts/traces.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import * as attach from '../services/attach-trace.ts';
import * as traces from '../services/traces.ts';
import type { Routes } from './route.ts';

export function traceRoutes(routes: Routes, deps: Deps): void {
  routes.shop(listTraces, may.seeShop, ({ actor, params }) => traces.listTraces(deps, actor, params.jobId));
  routes.shop(attachTrace, may.workStages, ({ actor, params, body }) =>
    attach.attachTrace(deps, actor, params.stageId, body),
  );
  routes.shop(readTrace, may.seeShop, ({ actor, params }) => traces.readTrace(deps, actor, params.traceId));
  routes.shop(removeTrace, may.workStages, ({ actor, params, body }) =>
    traces.removeTrace(deps, actor, params.traceId, body.removed),
  );
}
