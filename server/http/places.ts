import * as lamps from '#contracts/lamps.ts';
import * as places from '#contracts/places.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import { changeCircuit, createCircuit, removeCircuit } from '../services/change-circuits.ts';
import { changeLamp, createLamp } from '../services/change-lamp.ts';
import { changePlace } from '../services/change-place.ts';
import { changeZone, createZone, removeZone } from '../services/change-zones.ts';
import { createPlace } from '../services/create-place.ts';
import { exportLamps, importLamps } from '../services/lamps-csv.ts';
import { listLamps } from '../services/list-lamps.ts';
import { listPlaces } from '../services/list-places.ts';
import { orderPlaces } from '../services/order-places.ts';
import { exportPlaces, importPlaces } from '../services/places-csv.ts';
import { bringBackLamp, orderLamps, retireLamp } from '../services/retire-lamp.ts';
import { bringBackPlace, retirePlace } from '../services/retire-place.ts';
import type { Routes } from './route.ts';

/** Booths, prep stations, racks and the air they share. Everybody sees them, owners keep them. */
export function placeRoutes(routes: Routes, deps: Deps): void {
  routes.shop(places.listPlaces, may.seeShop, ({ actor }) => listPlaces(deps, actor));
  routes.shop(places.createPlace, may.setUp, ({ actor, body }) => createPlace(deps, actor, body));
  routes.shop(places.changePlace, may.setUp, ({ actor, params, body }) =>
    changePlace(deps, actor, params.placeId, body),
  );
  routes.shop(places.retirePlace, may.setUp, ({ actor, params, body }) =>
    retirePlace(deps, actor, params.placeId, body.version),
  );
  routes.shop(places.bringBackPlace, may.setUp, ({ actor, params, body }) =>
    bringBackPlace(deps, actor, params.placeId, body.version),
  );
  routes.shop(places.orderPlaces, may.setUp, async ({ actor, body }) => {
    await orderPlaces(deps, actor, body.placeIds);
    return {};
  });
  routes.shop(places.createZone, may.setUp, ({ actor, body }) => createZone(deps, actor, body.name));
  routes.shop(places.changeZone, may.setUp, ({ actor, params, body }) => changeZone(deps, actor, params.zoneId, body));
  routes.shop(places.removeZone, may.setUp, async ({ actor, params, body }) => {
    await removeZone(deps, actor, params.zoneId, body.version);
    return {};
  });
  routes.shop(places.exportPlaces, may.seeShop, ({ actor }) => exportPlaces(deps, actor));
  routes.shop(places.importPlaces, may.setUp, ({ actor, body }) => importPlaces(deps, actor, body));
}

/** Cure lamps and the circuits they hang on. */
export function lampRoutes(routes: Routes, deps: Deps): void {
  routes.shop(lamps.listLamps, may.seeShop, ({ actor }) => listLamps(deps, actor));
  routes.shop(lamps.createLamp, may.setUp, ({ actor, body }) => createLamp(deps, actor, body));
  routes.shop(lamps.changeLamp, may.setUp, ({ actor, params, body }) => changeLamp(deps, actor, params.lampId, body));
  routes.shop(lamps.retireLamp, may.setUp, ({ actor, params, body }) =>
    retireLamp(deps, actor, params.lampId, body.version),
  );
  routes.shop(lamps.bringBackLamp, may.setUp, ({ actor, params, body }) =>
    bringBackLamp(deps, actor, params.lampId, body.version),
  );
  routes.shop(lamps.orderLamps, may.setUp, async ({ actor, body }) => {
    await orderLamps(deps, actor, body.lampIds);
    return {};
  });
  routes.shop(lamps.createCircuit, may.setUp, ({ actor, body }) => createCircuit(deps, actor, body));
  routes.shop(lamps.changeCircuit, may.setUp, ({ actor, params, body }) =>
    changeCircuit(deps, actor, params.circuitId, body),
  );
  routes.shop(lamps.removeCircuit, may.setUp, async ({ actor, params, body }) => {
    await removeCircuit(deps, actor, params.circuitId, body.version);
    return {};
  });
  routes.shop(lamps.exportLamps, may.seeShop, ({ actor }) => exportLamps(deps, actor));
  routes.shop(lamps.importLamps, may.setUp, ({ actor, body }) => importLamps(deps, actor, body));
}
