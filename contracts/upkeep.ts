import * as z from 'zod';
import { id, inShop, instant, localDay } from './common.ts';
import { endpoint } from './endpoint.ts';
import { thingName } from './places.ts';

const version = z.number().int().min(1);
const pascals = z.number().min(0).max(100_000);

export const filterFields = z.strictObject({
  placeId: id,
  name: thingName,
  /** Due after so many hours of spraying in the place, or so many days, whichever comes first; null: not by that. */
  changeAfterHours: z.number().min(0.1).max(100_000).nullable(),
  changeAfterDays: z.number().int().min(1).max(3650).nullable(),
  /** Pressure drop at which it is changed whatever else. */
  pascalLimit: z.number().min(0.1).max(100_000).nullable(),
  efficiencyPercent: z.number().min(0).max(100).nullable(),
});
export type FilterFields = z.output<typeof filterFields>;

export const filterEntry = z.strictObject({
  id,
  kind: z.enum(['change', 'pressure']),
  at: instant,
  pascals: pascals.nullable(),
  note: z.string(),
  by: z.string().nullable(),
});
export type FilterEntry = z.output<typeof filterEntry>;

/** How a filter stands: counted from finished bookings, so work that nobody tapped done is not in it. */
export const filterStanding = z.strictObject({
  state: z.enum(['good', 'soon', 'due', 'never-changed']),
  /** Why it is due or soon. */
  because: z.enum(['hours', 'days', 'pressure']).nullable(),
  changedAt: instant.nullable(),
  /** Hours of spraying in the place since the last change. */
  sprayHours: z.number(),
  /** Hours of spraying a day, over the last four weeks. */
  hoursPerDay: z.number(),
  /** When it will be due by hours or days, whichever is sooner; null where neither says so. */
  dueOn: localDay.nullable(),
  pascals: pascals.nullable(),
  measuredAt: instant.nullable(),
});
export type FilterStanding = z.output<typeof filterStanding>;

export const filter = filterFields.extend({
  id,
  version,
  retired: z.boolean(),
  standing: filterStanding,
  /** The newest entries, newest first. */
  entries: z.array(filterEntry),
});
export type Filter = z.output<typeof filter>;

export const listFilters = endpoint({
  name: 'list-filters',
  method: 'GET',
  path: '/api/shops/:shopId/filters',
  params: inShop,
  reply: z.strictObject({ filters: z.array(filter) }),
});
export const createFilter = endpoint({
  name: 'create-filter',
  method: 'POST',
  path: '/api/shops/:shopId/filters',
  params: inShop,
  body: filterFields,
  reply: filter,
});
export const changeFilter = endpoint({
  name: 'change-filter',
  method: 'PATCH',
  path: '/api/shops/:shopId/filters/:filterId',
  params: inShop.extend({ filterId: id }),
  body: filterFields.omit({ placeId: true }).partial().extend({ version, retired: z.boolean().optional() }),
  reply: filter,
});
/** A change or a reading of the gauge, by who did it. Sent twice with the same id it is written once. */
export const addFilterEntry = endpoint({
  name: 'add-filter-entry',
  method: 'POST',
  path: '/api/shops/:shopId/filters/:filterId/entries',
  params: inShop.extend({ filterId: id }),
  body: z
    .strictObject({
      id,
      kind: z.enum(['change', 'pressure']),
      at: instant,
      pascals: pascals.nullable(),
      note: z.string().trim().max(400),
    })
    .refine(({ kind, pascals }) => kind === 'change' || pascals !== null, {
      path: ['pascals'],
      message: 'a reading needs its pascals',
    }),
  reply: filter,
});
export const removeFilterEntry = endpoint({
  name: 'remove-filter-entry',
  method: 'DELETE',
  path: '/api/shops/:shopId/filters/:filterId/entries/:entryId',
  params: inShop.extend({ filterId: id, entryId: id }),
  reply: filter,
});
