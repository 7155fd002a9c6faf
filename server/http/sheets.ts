import { listCoatings } from '#contracts/coatings.ts';
import { listSheets } from '#contracts/sheets.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import * as read from '../services/list-sheets.ts';
import type { Routes } from './route.ts';

export function sheetRoutes(routes: Routes, deps: Deps): void {
  routes.shop(listSheets, may.seeShop, ({ actor }) => read.listSheets(deps, actor));
  routes.shop(listCoatings, may.seeShop, ({ actor }) => read.listCoatings(deps, actor));
}
