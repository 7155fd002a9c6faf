import * as z from 'zod';
import { gapSource, phaseSource } from './coatings.ts';
import { endpoint } from './endpoint.ts';
import { attendance, id, inShop, name, phaseKind, placeKind } from './common.ts';

const minutes = z.number().int().min(0).max(20_160);

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
});

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
});
export type Way = z.output<typeof way>;

export const sheetStage = z.strictObject({
  key: z.string().regex(/^[a-z0-9-]{1,40}$/),
  kind: z.string().min(1).max(40),
  title: name,
  /** The stage is there only when this option is chosen; null: always. */
  option: z.string().nullable(),
  coatingId: id.nullable(),
  ways: z.array(way).min(1).max(12),
});

export const sheetBody = z.strictObject({
  summary: z.string().max(400),
  options: z.array(z.strictObject({ key: z.string(), label: z.string(), on: z.boolean() })),
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

export const listSheets = endpoint({
  name: 'list-sheets',
  method: 'GET',
  path: '/api/shops/:shopId/process-sheets',
  params: inShop,
  reply: z.strictObject({ sheets: z.array(sheet) }),
});
