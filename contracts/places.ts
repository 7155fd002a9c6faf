import * as z from 'zod';
import { clashes } from './clashes.ts';
import { id, inShop, placeKind } from './common.ts';
import { csvExport, csvImport, csvReport } from './csv.ts';
import { endpoint } from './endpoint.ts';

const version = z.number().int().min(1);
export const thingName = z.string().trim().min(1).max(80);

/** Air that is shared: what is sprayed in one place of a zone is in the air of the others. */
export const zone = z.strictObject({ id, name: z.string(), version });
export type Zone = z.output<typeof zone>;

export const placeFields = z.strictObject({
  kind: placeKind,
  name: thingName,
  zoneId: id.nullable(),
  /** Room in units; a bumper is about 1, a door 2. */
  units: z.number().int().min(1).max(1000),
  bakes: z.boolean(),
  /** Highest air temperature it may bake at; null: the cautious limit of combined booths. */
  bakeLimitCelsius: z.number().min(20).max(100).nullable(),
  volumeM3: z.number().min(0.1).max(100_000).nullable(),
  /** Null where nobody knows it: no heat is planned there then. */
  airFlowM3PerHour: z.number().min(1).max(1_000_000).nullable(),
  /** Measured minutes until nobody needs air-fed breathing equipment after spraying; 0: not measured. */
  clearanceMinutes: z.number().int().min(0).max(240),
});
export type PlaceFields = z.output<typeof placeFields>;

export const place = placeFields.extend({
  id,
  version,
  retired: z.boolean(),
  /** Before heat: `max(3 min, 4 V / Q)`; `refused` says what is missing, and no heat is planned there. */
  purge: z.strictObject({
    minutes: z.number().nullable(),
    refused: z.enum(['volume-unknown', 'air-flow-unknown', 'no-air-flow']).nullable(),
  }),
});
export type Place = z.output<typeof place>;

const onePlace = inShop.extend({ placeId: id });
const changed = z.strictObject({ place, clashes });

export const listPlaces = endpoint({
  name: 'list-places',
  method: 'GET',
  path: '/api/shops/:shopId/places',
  params: inShop,
  reply: z.strictObject({ places: z.array(place), zones: z.array(zone) }),
});
export const createPlace = endpoint({
  name: 'create-place',
  method: 'POST',
  path: '/api/shops/:shopId/places',
  params: inShop,
  body: placeFields,
  reply: changed,
});
/** Fields that are given; `clashes` is posted work that was in order before and is not any more. */
export const changePlace = endpoint({
  name: 'change-place',
  method: 'PATCH',
  path: '/api/shops/:shopId/places/:placeId',
  params: onePlace,
  body: placeFields.partial().extend({ version }),
  reply: changed,
});
/** Refused with what stands in it where posted work is still to be done there. */
export const retirePlace = endpoint({
  name: 'retire-place',
  method: 'POST',
  path: '/api/shops/:shopId/places/:placeId/retire',
  params: onePlace,
  body: z.strictObject({ version }),
  reply: place,
});
export const bringBackPlace = endpoint({
  name: 'bring-back-place',
  method: 'POST',
  path: '/api/shops/:shopId/places/:placeId/bring-back',
  params: onePlace,
  body: z.strictObject({ version }),
  reply: place,
});
/** Places in the order in which their rows are to stand. */
export const orderPlaces = endpoint({
  name: 'order-places',
  method: 'POST',
  path: '/api/shops/:shopId/places-order',
  params: inShop,
  body: z.strictObject({ placeIds: z.array(id).min(1).max(500) }),
});

export const createZone = endpoint({
  name: 'create-zone',
  method: 'POST',
  path: '/api/shops/:shopId/zones',
  params: inShop,
  body: z.strictObject({ name: thingName }),
  reply: zone,
});
export const changeZone = endpoint({
  name: 'change-zone',
  method: 'PATCH',
  path: '/api/shops/:shopId/zones/:zoneId',
  params: inShop.extend({ zoneId: id }),
  body: z.strictObject({ name: thingName, version }),
  reply: zone,
});
/** Refused while a place is in it. */
export const removeZone = endpoint({
  name: 'remove-zone',
  method: 'DELETE',
  path: '/api/shops/:shopId/zones/:zoneId',
  params: inShop.extend({ zoneId: id }),
  body: z.strictObject({ version }),
});

export const exportPlaces = endpoint({
  name: 'export-places',
  method: 'GET',
  path: '/api/shops/:shopId/places-csv',
  params: inShop,
  reply: csvExport,
});
export const importPlaces = endpoint({
  name: 'import-places',
  method: 'POST',
  path: '/api/shops/:shopId/places-csv',
  params: inShop,
  body: csvImport,
  reply: csvReport,
});
