import { finishStage, readBench, startStage } from '#contracts/bench.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import * as finish from '../services/finish-stage.ts';
import * as read from '../services/read-bench.ts';
import * as start from '../services/start-stage.ts';
import type { Routes } from './route.ts';

export function benchRoutes(routes: Routes, deps: Deps): void {
  routes.shop(readBench, may.workStages, ({ actor, query }) => read.readBench(deps, actor, query));
  routes.shop(startStage, may.workStages, ({ actor, params, body }) =>
    start.startStage(deps, actor, params.stageId, body),
  );
  routes.shop(finishStage, may.workStages, ({ actor, params, body }) =>
    finish.finishStage(deps, actor, params.stageId, body.version),
  );
}
