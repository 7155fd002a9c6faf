import {
  addReading,
  changeAirSettings,
  changeZoneAir,
  exportReadings,
  importReadings,
  listReadings,
  readAir,
} from '#contracts/air.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import * as add from '../services/add-reading.ts';
import * as change from '../services/change-air.ts';
import * as exported from '../services/export-readings.ts';
import * as imported from '../services/import-readings.ts';
import * as list from '../services/list-readings.ts';
import * as read from '../services/read-air.ts';
import type { Routes } from './route.ts';

export function airRoutes(routes: Routes, deps: Deps): void {
  routes.shop(readAir, may.seeShop, ({ actor }) => read.readAir(deps, actor));
  routes.shop(exportReadings, may.seeShop, ({ actor }) => exported.exportReadings(deps, actor));
  routes.shop(importReadings, may.plan, ({ actor, body }) => imported.importReadings(deps, actor, body));
  routes.shop(listReadings, may.seeShop, ({ actor, params, query }) =>
    list.listReadings(deps, actor, params.zoneId, query),
  );
  routes.shop(addReading, may.workStages, ({ actor, params, body }) =>
    add.addReading(deps, actor, params.zoneId, body),
  );
  routes.shop(changeAirSettings, may.plan, ({ actor, body }) => change.changeAirSettings(deps, actor, body));
  routes.shop(changeZoneAir, may.plan, ({ actor, params, body }) =>
    change.changeZoneAir(deps, actor, params.zoneId, body),
  );
}
