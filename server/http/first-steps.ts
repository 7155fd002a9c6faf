import * as contract from '#contracts/first-steps.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import { readFirstSteps } from '../services/read-first-steps.ts';
import * as take from '../services/take-first-step.ts';
import type { Routes } from './route.ts';

/** How an empty shop comes to its first plan. */
export function firstStepRoutes(routes: Routes, deps: Deps): void {
  routes.shop(contract.readFirstSteps, may.setUp, ({ actor }) => readFirstSteps(deps, actor));
  routes.shop(contract.takeHours, may.setUp, ({ actor, body }) => take.takeHours(deps, actor, body));
  routes.shop(contract.takePlaces, may.setUp, ({ actor, body }) => take.takePlaces(deps, actor, body));
  routes.shop(contract.takePeople, may.setUp, ({ actor, body }) => take.takePeople(deps, actor, body));
  routes.shop(contract.takeSheets, may.setUp, ({ actor, body }) => take.takeSheets(deps, actor, body));
  routes.shop(contract.takeJob, may.setUp, ({ actor, body }) => take.takeJob(deps, actor, body));
}
