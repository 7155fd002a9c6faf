import * as z from 'zod';
import { inCoating } from './coatings.ts';
import { id } from './common.ts';
import { endpoint } from './endpoint.ts';

const fromTo = z.strictObject({ from: z.number(), to: z.number() });

/** What re-timing makes of a way of a stage; null: that stays. */
const retimedWay = z.strictObject({
  label: z.string(),
  /** Of the whole way, and from its earliest start. */
  minutes: fromTo.nullable(),
  earliest: fromTo.nullable(),
  /** Null in it: no end. */
  latest: z.strictObject({ from: z.number().nullable(), to: z.number().nullable() }).nullable(),
  bakeCelsius: fromTo.nullable(),
});
const retimedStage = z.strictObject({ title: z.string(), ways: z.array(retimedWay), booked: z.boolean() });
const touched = { id, stages: z.array(retimedStage), differs: z.boolean() };

/** What names a coating, and what its data sheet would change there now. */
export const touchedByCoating = z.strictObject({
  version: z.number().int(),
  sheets: z.array(z.strictObject({ ...touched, name: z.string(), version: z.number().int() })),
  /** Open jobs with stages of it that have not begun. */
  jobs: z.array(z.strictObject({ ...touched, number: z.number().int(), title: z.string() })),
});
export type TouchedByCoating = z.output<typeof touchedByCoating>;

export const readTouched = endpoint({
  name: 'touched-by-coating',
  method: 'GET',
  path: '/api/shops/:shopId/coatings/:coatingId/touched',
  params: inCoating,
  reply: touchedByCoating,
});

/** Re-times these with the data sheet as it is: sheets get a new version, jobs keep theirs and change their stages. */
export const retimeWithCoating = endpoint({
  name: 'retime-with-coating',
  method: 'POST',
  path: '/api/shops/:shopId/coatings/:coatingId/retime',
  params: inCoating,
  body: z
    .strictObject({
      /** Of the data sheet, as it was looked at. */
      version: z.number().int(),
      sheetIds: z.array(id).max(500),
      jobIds: z.array(id).max(2_000),
    })
    .refine(({ sheetIds, jobIds }) => sheetIds.length + jobIds.length > 0, 'nothing is chosen'),
  reply: z.strictObject({
    sheets: z.number().int(),
    jobs: z.number().int(),
    /** Booked stages whose times are others now: the posted plan no longer fits them. */
    bookedStages: z.number().int(),
    touched: touchedByCoating,
  }),
});
