import * as z from 'zod';
import { endpoint } from './endpoint.ts';
import { id, inShop, instant } from './common.ts';
import { csvExport, csvImport, csvReport } from './csv.ts';

/** Air that can be in a workshop; anything else is a broken sensor or a slip of the finger. */
export const airCelsius = z.number().min(-20).max(60);
export const airHumidity = z.number().min(0).max(100);
/** Of the part to be sprayed: it may come warm from a bake. */
export const surfaceCelsius = z.number().min(-20).max(120);

export const airFigures = z.strictObject({ celsius: airCelsius, humidity: airHumidity });
/** Temperature in C, relative humidity in %. */
export type AirFigures = z.output<typeof airFigures>;

export const reading = airFigures.extend({
  id,
  at: instant,
  surfaceCelsius: surfaceCelsius.nullable(),
  source: z.enum(['hand', 'csv', 'key']),
});
export type Reading = z.output<typeof reading>;

/**
 * A reading held against the gate before spraying. `surfaceCelsius` is the air's where nobody measured the surface
 * (`surfaceMeasured` false). `fresh`: not older than the shop lets a reading count. `dewPointCelsius` null: quite dry air.
 */
export const airGate = z.strictObject({
  open: z.boolean(),
  fresh: z.boolean(),
  dewPointCelsius: z.number().nullable(),
  surfaceCelsius: z.number(),
  surfaceMeasured: z.boolean(),
  marginCelsius: z.number().nullable(),
  neededCelsius: z.number(),
});
export type AirGate = z.output<typeof airGate>;

const hour = z.number().int().min(0).max(24);
/** From one hour of the wall clock to another; outside of all rows the shop's default holds. */
export const airHours = airFigures
  .extend({ fromHour: hour, toHour: hour })
  .refine((row) => row.toHour > row.fromHour, { path: ['toHour'], message: 'ends before it begins' });
export type AirHours = z.output<typeof airHours>;

export const airSchedule = z
  .array(airHours)
  .max(24)
  .refine(
    (rows) => rows.every((a, i) => rows.every((b, k) => i === k || a.toHour <= b.fromHour || b.toHour <= a.fromHour)),
    {
      message: 'two rows speak of the same hour',
    },
  );

/** Where the planner takes a zone's air from: the shop's default, the latest reading of twelve hours, or hours. */
export const airSource = z.enum(['default', 'latest', 'schedule']);
export type AirSource = z.output<typeof airSource>;

export const airSettings = z.strictObject({
  /** 0: never set, these are the defaults. */
  version: z.number().int(),
  defaultCelsius: airCelsius,
  defaultHumidity: airHumidity,
  staleCelsius: z.number().min(0.5).max(20),
  staleHumidity: z.number().min(1).max(60),
  freshMinutes: z.number().int().min(5).max(1440),
  /** Surface over dew point; a shop may ask for more than 3.0 C, never for less (ISO 8502-4 practice). */
  marginCelsius: z.number().min(3).max(15),
});
export type AirSettings = z.output<typeof airSettings>;

export const defaultAirSettings: AirSettings = {
  version: 0,
  defaultCelsius: 20,
  defaultHumidity: 50,
  staleCelsius: 3,
  staleHumidity: 15,
  freshMinutes: 120,
  marginCelsius: 3,
};

export const zoneAir = z.strictObject({
  id,
  name: z.string(),
  places: z.array(z.string()),
  latest: reading.nullable(),
  gate: airGate.nullable(),
  source: airSource,
  schedule: z.array(airHours),
  version: z.number().int(),
  /** What the planner takes at this hour. */
  expected: airFigures,
});
export type ZoneAir = z.output<typeof zoneAir>;

export const airView = z.strictObject({ serverTime: instant, settings: airSettings, zones: z.array(zoneAir) });
export type AirView = z.output<typeof airView>;
export const readAir = endpoint({
  name: 'read-air',
  method: 'GET',
  path: '/api/shops/:shopId/air',
  params: inShop,
  reply: airView,
});

const inZone = inShop.extend({ zoneId: id });
export const MOST_POINTS = 600;
/** Readings of a span of at most 400 days, oldest first. Of more than 600 those are sent that hold the extremes. */
export const listReadings = endpoint({
  name: 'list-readings',
  method: 'GET',
  path: '/api/shops/:shopId/air/zones/:zoneId/readings',
  params: inZone,
  query: z.strictObject({ from: instant, to: instant }),
  reply: z.strictObject({ total: z.number().int(), readings: z.array(reading).max(MOST_POINTS) }),
});

export const written = z.strictObject({ written: z.number().int(), duplicate: z.number().int() });
/** By hand. The id is made by the browser, so that sending twice writes once. */
export const addReading = endpoint({
  name: 'add-reading',
  method: 'POST',
  path: '/api/shops/:shopId/air/zones/:zoneId/readings',
  params: inZone,
  body: airFigures.extend({ id, at: instant, surfaceCelsius: surfaceCelsius.nullable() }),
  reply: written,
});

/** Columns: zone, at, celsius, humidity, surface celsius (may be empty), id (may be missing). */
export const importReadings = endpoint({
  name: 'import-readings',
  method: 'POST',
  path: '/api/shops/:shopId/air/readings/import',
  params: inShop,
  body: csvImport,
  reply: csvReport,
});
/** The last 31 days, oldest first, as the import takes them back; of more than it takes at once the newest. */
export const exportReadings = endpoint({
  name: 'export-readings',
  method: 'GET',
  path: '/api/shops/:shopId/air/readings/export',
  params: inShop,
  reply: csvExport,
});

export const changeAirSettings = endpoint({
  name: 'change-air-settings',
  method: 'PATCH',
  path: '/api/shops/:shopId/air/settings',
  params: inShop,
  body: airSettings,
  reply: airView,
});
export const changeZoneAir = endpoint({
  name: 'change-zone-air',
  method: 'PATCH',
  path: '/api/shops/:shopId/air/zones/:zoneId',
  params: inZone,
  body: z.strictObject({ version: z.number().int(), source: airSource, schedule: airSchedule }),
  reply: airView,
});

/** A reading as a logger sends it. The zone by id or by name. */
export const sentReading = airFigures.extend({
  id,
  zone: z.string().trim().min(1).max(80),
  at: instant,
  surfaceCelsius: surfaceCelsius.nullish(),
});
export type SentReading = z.output<typeof sentReading>;

/**
 * For loggers: `Authorization: Bearer ovk_...`, no cookie. One reading or a list of up to 500; all are taken or none. An id
 * that is there with the same content counts as `duplicate`; with other content: 409 `taken`, each listed in `fields`.
 */
export const sendReadings = endpoint({
  name: 'send-readings',
  method: 'POST',
  path: '/api/readings',
  body: z.preprocess(
    (body: unknown): unknown => (Array.isArray(body) ? body : [body]),
    z.array(sentReading).min(1).max(500),
  ),
  reply: written,
});
