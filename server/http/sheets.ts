import { listCoatings } from '#contracts/coatings.ts';
import * as sheets from '#contracts/sheets.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import * as change from '../services/change-sheet.ts';
import * as create from '../services/create-sheet.ts';
import * as list from '../services/list-sheets.ts';
import * as ground from '../services/read-sheet-ground.ts';
import * as read from '../services/read-sheet.ts';
import * as save from '../services/save-sheet.ts';
import * as files from '../services/sheet-files.ts';
import type { Routes } from './route.ts';

export function sheetRoutes(routes: Routes, deps: Deps): void {
  routes.shop(sheets.listSheets, may.seeShop, ({ actor }) => list.listSheets(deps, actor));
  routes.shop(listCoatings, may.seeShop, ({ actor }) => list.listCoatings(deps, actor));

  routes.shop(sheets.surveySheets, may.seeShop, ({ actor }) => read.surveySheets(deps, actor));
  routes.shop(sheets.readSheetGround, may.seeShop, ({ actor }) => ground.readSheetGround(deps, actor));
  routes.shop(sheets.readSheet, may.seeShop, ({ actor, params }) => read.readSheet(deps, actor, params.sheetId));
  routes.shop(sheets.readSheetVersion, may.seeShop, ({ actor, params }) =>
    read.readVersion(deps, actor, params.sheetId, params.versionId),
  );

  routes.shop(sheets.createSheet, may.keepSheets, ({ actor, body }) => create.createSheet(deps, actor, body));
  routes.shop(sheets.saveSheet, may.keepSheets, ({ actor, params, body }) =>
    save.saveSheet(deps, actor, params.sheetId, body),
  );
  routes.shop(sheets.changeSheet, may.keepSheets, ({ actor, params, body }) =>
    change.changeSheet(deps, actor, params.sheetId, body),
  );

  routes.shop(sheets.exportSheet, may.seeShop, ({ actor, params }) => files.exportSheet(deps, actor, params.sheetId));
  routes.shop(sheets.importSheet, may.keepSheets, ({ actor, body }) => files.importSheet(deps, actor, body));
  routes.shop(sheets.exportSheets, may.seeShop, ({ actor }) => files.exportSheets(deps, actor));
}
