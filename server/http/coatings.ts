import * as contract from '#contracts/coatings.ts';
import { readTouched, retimeWithCoating } from '#contracts/retiming.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import { changeCoating } from '../services/change-coating.ts';
import { exportCoatings, importCoatings } from '../services/coatings-csv.ts';
import { createCoating } from '../services/create-coating.ts';
import { readCoating, surveyCoatings } from '../services/read-coatings.ts';
import { retimeWithCoating as retime } from '../services/retime-with-coating.ts';
import { readTouched as touchedBy } from '../services/touched-by-coating.ts';
import type { Routes } from './route.ts';

/** Data sheets of coatings. The list of those in use stands with the process sheets that name them. */
export function coatingRoutes(routes: Routes, deps: Deps): void {
  routes.shop(contract.surveyCoatings, may.seeShop, ({ actor, query }) => surveyCoatings(deps, actor, query));
  routes.shop(contract.readCoating, may.seeShop, ({ actor, params }) => readCoating(deps, actor, params.coatingId));
  routes.shop(contract.createCoating, may.keepSheets, ({ actor, body }) => createCoating(deps, actor, body));
  routes.shop(contract.changeCoating, may.keepSheets, ({ actor, params, body }) =>
    changeCoating(deps, actor, params.coatingId, body),
  );
  routes.shop(contract.exportCoatings, may.seeShop, ({ actor }) => exportCoatings(deps, actor));
  routes.shop(contract.importCoatings, may.keepSheets, ({ actor, body }) => importCoatings(deps, actor, body));
  routes.shop(readTouched, may.seeShop, ({ actor, params }) => touchedBy(deps, actor, params.coatingId));
  routes.shop(retimeWithCoating, may.keepSheets, ({ actor, params, body }) =>
    retime(deps, actor, params.coatingId, body),
  );
}
