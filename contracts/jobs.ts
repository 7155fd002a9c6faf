import * as z from 'zod';
import { endpoint } from './endpoint.ts';
import { id, inShop, instant, name, note, phaseKind, substrate } from './common.ts';
import { way } from './sheets.ts';

export const jobState = z.enum(['waiting', 'planned', 'running', 'done', 'withdrawn']);
export type JobState = z.output<typeof jobState>;

export const jobRow = z.strictObject({
  id,
  number: z.number().int(),
  title: z.string(),
  vehicle: z.string(),
  sheetName: z.string().nullable(),
  state: jobState,
  releaseAt: instant,
  promiseAt: instant.nullable(),
  /** End of the last booked stage; null while a stage has no booking. */
  endsAt: instant.nullable(),
  late: z.boolean(),
  stagesDone: z.number().int(),
  stagesTotal: z.number().int(),
  next: z.strictObject({ title: z.string(), startsAt: instant, placeName: z.string() }).nullable(),
  weight: z.number().int(),
});
export type JobRow = z.output<typeof jobRow>;

export const listJobs = endpoint({
  name: 'list-jobs',
  method: 'GET',
  path: '/api/shops/:shopId/jobs',
  params: inShop,
  query: z.strictObject({
    q: z.string().trim().max(100).optional(),
    state: z.enum(['open', 'waiting', 'planned', 'running', 'done', 'withdrawn', 'late', 'all']).default('open'),
    sort: z
      .enum(['promise', '-promise', 'number', '-number', 'title', '-title', 'release', '-release'])
      .default('promise'),
    page: z.coerce.number().int().min(1).max(100_000).default(1),
    size: z.coerce.number().int().min(1).max(200).default(50),
  }),
  reply: z.strictObject({
    rows: z.array(jobRow),
    total: z.number().int(),
    page: z.number().int(),
    size: z.number().int(),
  }),
});

export const partInput = z.strictObject({ name, substrate, units: z.number().int().min(1).max(100) });

export const window = z.strictObject({
  /** Earliest and latest start that the chemistry leaves, given where the previous stage ends; null: no limit. */
  earliest: instant.nullable(),
  latest: instant.nullable(),
});

export const bookingView = z.strictObject({
  id,
  way: z.string(),
  wayLabel: z.string(),
  placeId: id,
  placeName: z.string(),
  personId: id.nullable(),
  personName: z.string().nullable(),
  lampNames: z.array(z.string()),
  from: instant,
  to: instant,
  phases: z.array(z.strictObject({ kind: phaseKind, from: instant, to: instant })),
  pinned: z.boolean(),
  state: z.enum(['planned', 'running', 'done']),
});

/** Why a stage was begun although a gate was shut, by whom and when; for `dew-point` figures as in its reason. */
export const overruled = z.strictObject({
  rule: z.literal('dew-point'),
  reason: z.string(),
  by: z.string().nullable(),
  at: instant,
  figures: z.array(z.number()),
});

export const jobStage = z.strictObject({
  id,
  position: z.number().int(),
  kind: z.string(),
  title: z.string(),
  state: z.enum(['waiting', 'running', 'done']),
  startedAt: instant.nullable(),
  finishedAt: instant.nullable(),
  ways: z.array(way),
  window,
  booking: bookingView.nullable(),
  overruled: overruled.nullable(),
});
export type JobStage = z.output<typeof jobStage>;

export const job = z.strictObject({
  id,
  number: z.number().int(),
  version: z.number().int(),
  title: z.string(),
  vehicle: z.string(),
  colourNote: z.string(),
  notes: z.string(),
  sheet: z.strictObject({ id, name: z.string(), version: z.number().int() }).nullable(),
  state: jobState,
  releaseAt: instant,
  promiseAt: instant.nullable(),
  endsAt: instant.nullable(),
  late: z.boolean(),
  weight: z.number().int(),
  electric: z.boolean(),
  heatLimitCelsius: z.number().nullable(),
  heatLimitMinutes: z.number().int().nullable(),
  parts: z.array(partInput.extend({ id })),
  stages: z.array(jobStage),
  history: z.array(
    z.strictObject({
      at: instant,
      by: z.string().nullable(),
      kind: z.string(),
      detail: z.record(z.string(), z.unknown()),
    }),
  ),
});
export type Job = z.output<typeof job>;

const inJob = inShop.extend({ jobId: id });
export const readJob = endpoint({
  name: 'read-job',
  method: 'GET',
  path: '/api/shops/:shopId/jobs/:jobId',
  params: inJob,
  reply: job,
});

const jobFields = {
  title: z.string().trim().min(1).max(160),
  vehicle: z.string().trim().max(160),
  colourNote: note,
  notes: note,
  releaseAt: instant,
  promiseAt: instant.nullable(),
  weight: z.number().int().min(1).max(9),
  electric: z.boolean(),
  heatLimitCelsius: z.number().min(20).max(120).nullable(),
  heatLimitMinutes: z.number().int().min(1).max(1440).nullable(),
};

export const newJob = z.strictObject({
  /** Made by the browser, so that sending twice makes one job. */
  id,
  sheetId: id,
  /** Keys of the sheet's options that are chosen; of extra coats as often as there are to be. */
  options: z.array(z.string()).max(40),
  parts: z.array(partInput).min(1).max(40),
  ...jobFields,
});
export type NewJob = z.output<typeof newJob>;
export const createJob = endpoint({
  name: 'create-job',
  method: 'POST',
  path: '/api/shops/:shopId/jobs',
  params: inShop,
  body: newJob,
  reply: job,
});

export const changeJob = endpoint({
  name: 'change-job',
  method: 'PATCH',
  path: '/api/shops/:shopId/jobs/:jobId',
  params: inJob,
  body: z.strictObject({ version: z.number().int() }).extend(z.object(jobFields).partial().shape).strict(),
  reply: job,
});
export const withdrawJob = endpoint({
  name: 'withdraw-job',
  method: 'POST',
  path: '/api/shops/:shopId/jobs/:jobId/withdraw',
  params: inJob,
  body: z.strictObject({ version: z.number().int() }),
  reply: job,
});
