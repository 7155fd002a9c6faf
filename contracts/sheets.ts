import * as z from 'zod';
import { gapSource, phaseSource } from './coatings.ts';
import { endpoint } from './endpoint.ts';
import { attendance, id, inShop, instant, name, phaseKind, placeKind } from './common.ts';
import { csvExport } from './csv.ts';

const minutes = z.number().int().min(0).max(20_160);

const optionKey = z.string().regex(/^[a-z0-9-]{1,40}$/);

export const phase = z.strictObject({
  kind: phaseKind,
  minutes,
  attendance,
  /** True: the lamps are on. */
  lamp: z.boolean().optional(),
  /** Idle minutes that may follow before the next phase. */
  wait: minutes.optional(),
  /** The line of the coating's data sheet that the minutes were taken from; absent: set by hand. */
  source: phaseSource.optional(),
  /** Of an extra coat: there as often as this option is chosen, together with its neighbours of the same option. */
  perExtraCoat: optionKey.optional(),
});
export type Phase = z.output<typeof phase>;

export const gap = z
  .strictObject({ min: minutes, max: minutes.nullable(), settle: minutes, source: gapSource.optional() })
  .refine((g) => g.max === null || g.max >= g.min, 'the latest start lies before the earliest')
  .refine((g) => g.settle <= g.min, 'the place is held longer than the part has to wait');

/** One of the ways to do a stage. The planner picks; who and where are worked out when a problem is built. */
export const way = z.strictObject({
  id: z.string().regex(/^[a-z0-9-]{1,40}$/),
  label: z.string().min(1).max(60),
  /** Kinds of place that will do; none where `stay` is true. */
  placeKinds: z.array(placeKind),
  stay: z.boolean(),
  /** Skill a person needs for it; null where no phase needs hands. A spray phase needs training besides. */
  skill: z.string().nullable(),
  lampCount: z.number().int().min(0).max(8),
  family: z.string().nullable(),
  /** Stages with the same value may share one booth run; null: never. */
  load: z.string().nullable(),
  gap,
  split: z.boolean(),
  /** Temperature of the bake in C, held against the limits of booth, part and vehicle; null where nothing is heated. */
  bakeCelsius: z.number().min(20).max(200).nullable(),
  phases: z.array(phase).min(1).max(40),
  /** The way is there only with, or only without, this option; absent: always. In a job it is settled and gone. */
  option: optionKey.optional(),
  unlessOption: optionKey.optional(),
});
export type Way = z.output<typeof way>;

export const sheetStage = z.strictObject({
  key: z.string().regex(/^[a-z0-9-]{1,40}$/),
  kind: z.string().min(1).max(40),
  title: name,
  /** The stage is there only when this option is chosen; null: always. */
  option: z.string().nullable(),
  /** The stage falls out when this option is chosen; absent: never. */
  unlessOption: optionKey.optional(),
  coatingId: id.nullable(),
  ways: z.array(way).min(1).max(12),
});
export type SheetStage = z.output<typeof sheetStage>;

export const sheetOption = z.strictObject({
  key: optionKey,
  label: z.string().trim().min(1).max(60),
  on: z.boolean(),
  /** How often it may be chosen, as of extra coats; absent: once. A job names the key that often. */
  most: z.number().int().min(1).max(6).optional(),
});
export type SheetOption = z.output<typeof sheetOption>;

export const sheetBody = z.strictObject({
  summary: z.string().max(400),
  options: z.array(sheetOption).max(12),
  /** What a job made from it gets as parts unless said otherwise. */
  parts: z.array(
    z.strictObject({
      name,
      substrate: z.enum(['steel', 'aluminium', 'pp-tpo', 'abs', 'composite']),
      units: z.number().int().min(1).max(100),
    }),
  ),
  stages: z.array(sheetStage).min(1).max(60),
});
export type SheetBody = z.output<typeof sheetBody>;

export const sheet = z.strictObject({
  id,
  name: z.string(),
  version: z.number().int(),
  versionId: id,
  body: sheetBody,
});
export type Sheet = z.output<typeof sheet>;

const inSheet = inShop.extend({ sheetId: id });
const savedBy = { at: instant, by: z.string().nullable(), note: z.string() };

/** One posted version, as it stands in the list of versions: newest first. */
export const sheetEdition = z.strictObject({
  version: z.number().int(),
  versionId: id,
  openJobs: z.number().int(),
  ...savedBy,
});
export type SheetEdition = z.output<typeof sheetEdition>;

/** A sheet with everything its page shows. `revision` counts every change, renaming and retiring too. */
export const sheetDetail = sheet.extend({
  revision: z.number().int(),
  retiredAt: instant.nullable(),
  versions: z.array(sheetEdition),
});
export type SheetDetail = z.output<typeof sheetDetail>;

/** For making jobs: the newest version of every sheet that is not retired. */
export const listSheets = endpoint({
  name: 'list-sheets',
  method: 'GET',
  path: '/api/shops/:shopId/process-sheets',
  params: inShop,
  reply: z.strictObject({ sheets: z.array(sheet) }),
});

/** For keeping them: retired ones too, with the open jobs that were made from each in any version. */
export const surveySheets = endpoint({
  name: 'survey-sheets',
  method: 'GET',
  path: '/api/shops/:shopId/process-sheet-survey',
  params: inShop,
  reply: z.strictObject({
    sheets: z.array(
      sheet.extend({
        revision: z.number().int(),
        retiredAt: instant.nullable(),
        openJobs: z.number().int(),
        savedAt: instant,
      }),
    ),
  }),
});
export type SheetSurvey = z.output<typeof surveySheets.reply>['sheets'][number];

export const readSheet = endpoint({
  name: 'read-sheet',
  method: 'GET',
  path: '/api/shops/:shopId/process-sheets/:sheetId',
  params: inSheet,
  reply: sheetDetail,
});

/** A version as it was posted; jobs made from it keep it. */
export const readSheetVersion = endpoint({
  name: 'read-sheet-version',
  method: 'GET',
  path: '/api/shops/:shopId/process-sheets/:sheetId/versions/:versionId',
  params: inSheet.extend({ versionId: id }),
  reply: z.strictObject({ version: z.number().int(), versionId: id, body: sheetBody, ...savedBy }),
});

const saveNote = z.string().trim().max(400);

export const createSheet = endpoint({
  name: 'create-sheet',
  method: 'POST',
  path: '/api/shops/:shopId/process-sheets',
  params: inShop,
  body: z
    .strictObject({
      /** Made by the browser, so that sending twice makes one sheet. */
      id,
      name,
      body: sheetBody.optional(),
      /** Instead of a body: the newest version of this sheet is copied. */
      copyOf: id.optional(),
      note: saveNote.default(''),
    })
    .refine((given) => (given.body === undefined) !== (given.copyOf === undefined), {
      path: ['body'],
      message: 'either a body or a sheet to copy',
    }),
  reply: sheetDetail,
});

/** Saves a changed sheet as its next version. Jobs keep the version they were made with. */
export const saveSheet = endpoint({
  name: 'save-sheet',
  method: 'POST',
  path: '/api/shops/:shopId/process-sheets/:sheetId/versions',
  params: inSheet,
  body: z.strictObject({
    version: z.number().int(),
    name: name.optional(),
    body: sheetBody,
    note: saveNote.default(''),
  }),
  reply: sheetDetail,
});

/** Renames, retires or brings back; makes no version. */
export const changeSheet = endpoint({
  name: 'change-sheet',
  method: 'PATCH',
  path: '/api/shops/:shopId/process-sheets/:sheetId',
  params: inSheet,
  body: z.strictObject({ revision: z.number().int(), name: name.optional(), retired: z.boolean().optional() }),
  reply: sheetDetail,
});

/** A sheet as a file that another shop can take: coatings by their names, not by ids. */
export const sheetFile = z.strictObject({
  format: z.literal('ovenbird-process-sheet'),
  formatVersion: z.literal(1),
  name,
  body: sheetBody.extend({
    stages: z
      .array(sheetStage.omit({ coatingId: true }).extend({ coating: z.string().max(120).nullable() }))
      .min(1)
      .max(60),
  }),
});
export type SheetFile = z.output<typeof sheetFile>;

export const exportSheet = endpoint({
  name: 'export-sheet',
  method: 'GET',
  path: '/api/shops/:shopId/process-sheets/:sheetId/file',
  params: inSheet,
  reply: z.strictObject({ fileName: z.string(), file: sheetFile }),
});

/** Takes a file in as a new sheet; each coating it names must be there under that name. */
export const importSheet = endpoint({
  name: 'import-sheet',
  method: 'POST',
  path: '/api/shops/:shopId/process-sheet-imports',
  params: inShop,
  body: z.strictObject({ id, file: sheetFile, name: name.optional() }),
  reply: sheetDetail,
});

/** All sheets that are in use, one line a phase. */
export const exportSheets = endpoint({
  name: 'export-sheets',
  method: 'GET',
  path: '/api/shops/:shopId/process-sheets-csv',
  params: inShop,
  reply: csvExport,
});

/** What the shop has that sheets rely on: for faults that only the roster and the places can show. */
export const sheetGround = z.strictObject({
  /** Skills on the roster, with how many have each, and how many of those may spray today. */
  skills: z.array(z.strictObject({ skill: z.string(), people: z.number().int(), trained: z.number().int() })),
  lamps: z.number().int(),
  places: z.array(
    z.strictObject({
      kind: placeKind,
      units: z.number().int(),
      bakes: z.boolean(),
      bakeLimitCelsius: z.number().nullable(),
    }),
  ),
});
export type SheetGround = z.output<typeof sheetGround>;

export const readSheetGround = endpoint({
  name: 'read-sheet-ground',
  method: 'GET',
  path: '/api/shops/:shopId/process-sheet-ground',
  params: inShop,
  reply: sheetGround,
});
