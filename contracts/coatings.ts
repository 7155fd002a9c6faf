import * as z from 'zod';
import { attachment } from './attachments.ts';
import { id, inShop, instant, name } from './common.ts';
import { csvExport, csvImport, csvReport } from './csv.ts';
import { endpoint } from './endpoint.ts';

/** As `minutes` of a process sheet: two weeks at most. */
const minutes = z.number().int().min(0).max(20_160);
const someMinutes = minutes.min(1);
const celsius = z.number().min(-10).max(200);
const factor = z.number().min(1).max(5);

/** What a coating is for. `base` is a solvent base; the words are in src/lib/coating-words.ts. */
export const coatingKind = z.enum([
  'promoter',
  'etch-primer',
  'epoxy-primer',
  'primer',
  'filler',
  'sealer',
  'base',
  'waterborne-base',
  'clear',
  'single-stage',
  'other',
]);
export type CoatingKind = z.output<typeof coatingKind>;

/**
 * Where a phase's minutes come from in the data sheet of the stage's coating; without one they were set by hand. `coat`:
 * one coat sprayed, whose number the sheet gives, not its minutes.
 */
export const phaseSource = z.enum([
  'coat',
  'flash-between',
  'flash-next',
  'flash-heat',
  'bake',
  'lamp-short',
  'lamp-medium',
  'air',
]);
export type PhaseSource = z.output<typeof phaseSource>;

/**
 * Where a gap before a stage comes from in the data sheet of the coating that was put on last before it. `recoat`: from the
 * flash before the next product to the end of the recoat window. `next`: the same beginning, an earlier end set by hand.
 * `heat`: from the flash before heat, its end set by hand.
 */
export const gapSource = z.enum(['recoat', 'next', 'heat']);
export type GapSource = z.output<typeof gapSource>;

const lampCure = z.strictObject({ minutes: someMinutes, metres: z.number().min(0.1).max(3) });

/** What a coating's data sheet says, in C and minutes; null: the sheet says nothing of it. */
export const coatingSheet = z.strictObject({
  /** Maker and product as on the can, and which edition of the maker's sheet was read. */
  maker: z.string().trim().max(120),
  edition: z.string().trim().max(60),
  coats: z.strictObject({ from: z.number().int().min(1).max(12), to: z.number().int().min(1).max(12) }),
  flashBetweenCoats: minutes,
  /** To the next product, and so the beginning of the recoat window. */
  flashBeforeNext: minutes,
  flashBeforeHeat: minutes,
  /** The last minute at which the next product takes without sanding; null: no end. */
  recoatWithin: minutes.nullable(),
  potLife: someMinutes.nullable(),
  airDry: z.strictObject({ minutes: someMinutes, celsius }).nullable(),
  /** `celsius` is metal or booth air, as the maker says; a metal time gets the shop's heat-up on top (absent: 10 min). */
  bake: z
    .strictObject({
      minutes: someMinutes,
      celsius,
      measuredAt: z.enum(['metal', 'air']),
      heatUp: z.number().int().min(0).max(240).optional(),
    })
    .nullable(),
  lampShort: lampCure.nullable(),
  lampMedium: lampCure.nullable(),
  /** The hottest the film may get. */
  heatLimitCelsius: celsius.nullable(),
  /** Air temperatures between which the sheet's figures hold. */
  holds: z.strictObject({ from: celsius, to: celsius }).nullable(),
  /** Activation energy of the cure, kJ/mol, set by the shop; null: fitted to the sheet's own two points, or the default. */
  kilojoulesPerMole: z.number().min(1).max(200).nullable(),
  /** By how much the shop stretches flashes in cold and in damp air: experience, not precision; null: not at all. */
  coldAir: z.strictObject({ belowCelsius: celsius, factor }).nullable(),
  dampAir: z.strictObject({ abovePercent: z.number().min(0).max(100), factor }).nullable(),
  cautions: z.array(z.string().trim().min(1).max(300)).max(12),
});
export type CoatingSheet = z.output<typeof coatingSheet>;

/** One coat and nothing known: where a new data sheet begins, and what an older row lacks. */
export const emptySheet: CoatingSheet = {
  maker: '',
  edition: '',
  coats: { from: 1, to: 1 },
  flashBetweenCoats: 0,
  flashBeforeNext: 0,
  flashBeforeHeat: 0,
  recoatWithin: null,
  potLife: null,
  airDry: null,
  bake: null,
  lampShort: null,
  lampMedium: null,
  heatLimitCelsius: null,
  holds: null,
  kilojoulesPerMole: null,
  coldAir: null,
  dampAir: null,
  cautions: [],
};

export const coating = z.strictObject({ id, name, kind: coatingKind, sheet: coatingSheet });
export type Coating = z.output<typeof coating>;

export const inCoating = inShop.extend({ coatingId: id });

/** For use: the data sheets that are not retired. */
export const listCoatings = endpoint({
  name: 'list-coatings',
  method: 'GET',
  path: '/api/shops/:shopId/coatings',
  params: inShop,
  reply: z.strictObject({ coatings: z.array(coating) }),
});

/** A data sheet as its page shows it. */
export const coatingDetail = coating.extend({
  version: z.number().int(),
  retiredAt: instant.nullable(),
  /** The maker's own sheet, as a file. */
  document: attachment.nullable(),
  /** Process sheets in use whose newest version names it. */
  usedBy: z.array(z.strictObject({ id, name: z.string() })),
});
export type CoatingDetail = z.output<typeof coatingDetail>;

/** For keeping them: by name, those in use or those that are retired. */
export const surveyCoatings = endpoint({
  name: 'survey-coatings',
  method: 'GET',
  path: '/api/shops/:shopId/coating-survey',
  params: inShop,
  query: z.strictObject({ retired: z.enum(['no', 'yes']).default('no') }),
  reply: z.strictObject({ coatings: z.array(coatingDetail) }),
});

export const readCoating = endpoint({
  name: 'read-coating',
  method: 'GET',
  path: '/api/shops/:shopId/coatings/:coatingId',
  params: inCoating,
  reply: coatingDetail,
});

const fields = { name, kind: coatingKind, sheet: coatingSheet };

/** The id is made by the browser, so that sending twice makes one. */
export const newCoating = z.strictObject({ id, ...fields });
export const createCoating = endpoint({
  name: 'create-coating',
  method: 'POST',
  path: '/api/shops/:shopId/coatings',
  params: inShop,
  body: newCoating,
  reply: coatingDetail,
});

/** `retired` takes it out of use or brings it back. What says the same as before changes nothing. */
export const coatingChange = z.strictObject({
  version: z.number().int(),
  name: name.optional(),
  kind: coatingKind.optional(),
  sheet: coatingSheet.optional(),
  retired: z.boolean().optional(),
});
export const changeCoating = endpoint({
  name: 'change-coating',
  method: 'PATCH',
  path: '/api/shops/:shopId/coatings/:coatingId',
  params: inCoating,
  body: coatingChange,
  reply: coatingDetail,
});

export const exportCoatings = endpoint({
  name: 'export-coatings',
  method: 'GET',
  path: '/api/shops/:shopId/coatings-csv',
  params: inShop,
  reply: csvExport,
});
export const importCoatings = endpoint({
  name: 'import-coatings',
  method: 'POST',
  path: '/api/shops/:shopId/coating-imports',
  params: inShop,
  body: csvImport,
  reply: csvReport,
});

export const uploadDataSheet = {
  name: 'upload-data-sheet',
  method: 'POST',
  path: '/api/shops/:shopId/coatings/:coatingId/document',
  params: inCoating,
  reply: coatingDetail,
} as const;

export const removeDataSheet = endpoint({
  name: 'remove-data-sheet',
  method: 'DELETE',
  path: '/api/shops/:shopId/coatings/:coatingId/document',
  params: inCoating,
  reply: coatingDetail,
});
