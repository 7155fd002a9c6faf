import * as z from 'zod';
import { clashes } from './clashes.ts';
import { id, inShop, localDay } from './common.ts';
import { csvExport, csvImport, csvReport } from './csv.ts';
import { endpoint } from './endpoint.ts';
import { localTime, recurrenceRule, weekdays } from './recurrence.ts';

const version = z.number().int().min(1);
const opening = z.strictObject({
  startsLocal: localTime,
  rule: recurrenceRule.nullable(),
  minutes: z.number().int().min(1).max(1440),
});

/** Open from and to in minutes after midnight of that day; what ends after 1440 runs into the next. */
export const weekSpan = z
  .strictObject({
    day: z.enum(weekdays),
    from: z.number().int().min(0).max(1439),
    to: z.number().int().min(1).max(2879),
  })
  .refine(({ from, to }) => to > from && to - from <= 1440, { path: ['to'], message: 'ends before it begins' });
export type WeekSpan = z.output<typeof weekSpan>;

export const extraOpening = opening.extend({ id });
export type ExtraOpening = z.output<typeof extraOpening>;

export const closureKind = z.enum(['holiday', 'closure', 'maintenance', 'breakdown']);
export type ClosureKind = z.output<typeof closureKind>;
const closureShape = {
  kind: closureKind,
  label: z.string().trim().max(120),
  /** Neither place nor lamp: the whole shop. */
  placeId: id.nullable(),
  lampId: id.nullable(),
  startsLocal: localTime,
  rule: recurrenceRule.nullable(),
  minutes: z.number().int().min(1).max(525_600),
};
const oneThing = {
  path: ['lampId'],
  message: 'a closure is of one place, of one lamp or of the whole shop',
};
export const closureFields = z
  .strictObject(closureShape)
  .refine(({ placeId, lampId }) => placeId === null || lampId === null, oneThing);
export type ClosureFields = z.output<typeof closureFields>;
export const closure = z.strictObject({ ...closureShape, id, version });
export type Closure = z.output<typeof closure>;

export const readHours = endpoint({
  name: 'read-hours',
  method: 'GET',
  path: '/api/shops/:shopId/hours',
  params: inShop,
  reply: z.strictObject({
    version,
    timeZone: z.string(),
    /** The usual week as it is from today on. */
    week: z.array(weekSpan),
    /** A week that begins on a later day, where one was set already. */
    next: z.strictObject({ from: localDay, week: z.array(weekSpan) }).nullable(),
    /** Opening hours that are no part of a week: once, every second Saturday, until a day. */
    extra: z.array(extraOpening),
    closures: z.array(closure),
    /** What can be closed. */
    places: z.array(z.strictObject({ id, name: z.string(), retired: z.boolean() })),
    lamps: z.array(z.strictObject({ id, name: z.string(), retired: z.boolean() })),
  }),
});
/**
 * The usual week from a day on. What was open before that day stays as it was, so that reports of the past stay true.
 * `version` is that of the hours as a whole.
 */
export const setWeek = endpoint({
  name: 'set-week',
  method: 'POST',
  path: '/api/shops/:shopId/week',
  params: inShop,
  body: z.strictObject({ version, from: localDay, week: z.array(weekSpan).max(70) }),
  reply: z.strictObject({ version, clashes }),
});
export const addOpening = endpoint({
  name: 'add-opening',
  method: 'POST',
  path: '/api/shops/:shopId/openings',
  params: inShop,
  body: opening,
  reply: z.strictObject({ id, version, clashes }),
});
export const removeOpening = endpoint({
  name: 'remove-opening',
  method: 'DELETE',
  path: '/api/shops/:shopId/openings/:openingId',
  params: inShop.extend({ openingId: id }),
  reply: z.strictObject({ version, clashes }),
});

const changed = z.strictObject({ closure, clashes });
const oneClosure = inShop.extend({ closureId: id });
export const createClosure = endpoint({
  name: 'create-closure',
  method: 'POST',
  path: '/api/shops/:shopId/closures',
  params: inShop,
  body: closureFields,
  reply: changed,
});
export const changeClosure = endpoint({
  name: 'change-closure',
  method: 'PATCH',
  path: '/api/shops/:shopId/closures/:closureId',
  params: oneClosure,
  body: z
    .strictObject({ ...closureShape, version })
    .refine(({ placeId, lampId }) => placeId === null || lampId === null, oneThing),
  reply: changed,
});
export const removeClosure = endpoint({
  name: 'remove-closure',
  method: 'DELETE',
  path: '/api/shops/:shopId/closures/:closureId',
  params: oneClosure,
  body: z.strictObject({ version }),
});

export const exportClosures = endpoint({
  name: 'export-closures',
  method: 'GET',
  path: '/api/shops/:shopId/closures-csv',
  params: inShop,
  reply: csvExport,
});
export const importClosures = endpoint({
  name: 'import-closures',
  method: 'POST',
  path: '/api/shops/:shopId/closures-csv',
  params: inShop,
  body: csvImport,
  reply: csvReport,
});
