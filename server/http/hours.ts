import * as contract from '#contracts/hours.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import { changeClosure, createClosure, removeClosure } from '../services/change-closures.ts';
import { addOpening, removeOpening } from '../services/change-openings.ts';
import { exportClosures, importClosures } from '../services/closures-csv.ts';
import { readHours } from '../services/read-hours.ts';
import { setWeek } from '../services/set-week.ts';
import type { Routes } from './route.ts';

/** Opening hours, which owners set, and closures, which whoever plans enters: a breakdown does not wait for the owner. */
export function hoursRoutes(routes: Routes, deps: Deps): void {
  routes.shop(contract.readHours, may.seeShop, ({ actor }) => readHours(deps, actor));
  routes.shop(contract.setWeek, may.setUp, ({ actor, body }) => setWeek(deps, actor, body));
  routes.shop(contract.addOpening, may.setUp, ({ actor, body }) => addOpening(deps, actor, body));
  routes.shop(contract.removeOpening, may.setUp, ({ actor, params }) => removeOpening(deps, actor, params.openingId));
  routes.shop(contract.createClosure, may.plan, ({ actor, body }) => createClosure(deps, actor, body));
  routes.shop(contract.changeClosure, may.plan, ({ actor, params, body }) =>
    changeClosure(deps, actor, params.closureId, body),
  );
  routes.shop(contract.removeClosure, may.plan, async ({ actor, params, body }) => {
    await removeClosure(deps, actor, params.closureId, body.version);
    return {};
  });
  routes.shop(contract.exportClosures, may.seeShop, ({ actor }) => exportClosures(deps, actor));
  routes.shop(contract.importClosures, may.plan, ({ actor, body }) => importClosures(deps, actor, body));
}
