import * as z from 'zod';
import { endpoint } from './endpoint.ts';
import { id, inShop, instant } from './common.ts';

const minutes = z.number().min(0).max(20_160);
const celsius = z.number().min(-60).max(600);

/** What a data sheet prints of curing: so many minutes at that temperature. */
export const curePoint = z.strictObject({ celsius, minutes: minutes.positive() });

/** A bake held against its data sheet. `doneMinutes` and `neededMinutes` count at `referenceCelsius`, the sheet's bake. */
export const traceVerdict = z.strictObject({
  cured: z.boolean(),
  doneMinutes: z.number(),
  neededMinutes: z.number(),
  leftMinutes: z.number(),
  referenceCelsius: z.number(),
  /** Of the readings that were judged (the coldest spot), and of the hottest spot where several were recorded. */
  peakCelsius: z.number(),
  hottestCelsius: z.number().nullable(),
  limitCelsius: z.number().nullable(),
  tooHot: z.boolean(),
  longestGapMinutes: z.number(),
  lengthMinutes: z.number(),
  rows: z.number().int(),
});
export type TraceVerdict = z.output<typeof traceVerdict>;

export const trace = z.strictObject({
  id,
  stageId: id,
  fileName: z.string(),
  at: instant,
  by: z.string().nullable(),
  /** Null: held against points that were typed. */
  coatingId: id.nullable(),
  coatingName: z.string().nullable(),
  verdict: traceVerdict,
  /** At most 200 points [minutes, C], for a small drawing; peaks are never lost. */
  curve: z.array(z.tuple([z.number(), z.number()])),
});
export type BakeTrace = z.output<typeof trace>;

export const listTraces = endpoint({
  name: 'list-traces',
  method: 'GET',
  path: '/api/shops/:shopId/jobs/:jobId/traces',
  params: inShop.extend({ jobId: id }),
  reply: z.strictObject({ traces: z.array(trace) }),
});

/** Most of the readings once unpacked, in bytes: some 300,000 rows. */
export const MOST_TRACE_BYTES = 8_000_000;

/**
 * A logger's readings, attached to a stage. `rows`: lines `minutes,celsius` from the first reading on, never going back,
 * gzip, base64. The server judges them again by itself. `coatingId`: the shop's data sheet; null: by `points`.
 */
export const attachTrace = endpoint({
  name: 'attach-trace',
  method: 'POST',
  path: '/api/shops/:shopId/stages/:stageId/traces',
  params: inShop.extend({ stageId: id }),
  body: z.strictObject({
    id,
    fileName: z.string().trim().min(1).max(200),
    coatingId: id.nullable(),
    points: z.array(curePoint).max(2),
    /** Minutes that earlier bakes of the same coat earned, at the reference temperature. */
    earlierMinutes: minutes,
    limitCelsius: celsius.nullable(),
    hottestCelsius: celsius.nullable(),
    rows: z.base64().max(950_000),
  }),
  reply: trace,
});

/** With its readings as a CSV that the cure desk reads. */
export const readTrace = endpoint({
  name: 'read-trace',
  method: 'GET',
  path: '/api/shops/:shopId/traces/:traceId',
  params: inShop.extend({ traceId: id }),
  reply: z.strictObject({ trace, csv: z.string() }),
});

/** Taken off, or put back: it is kept, so that removing can be undone. */
export const removeTrace = endpoint({
  name: 'remove-trace',
  method: 'POST',
  path: '/api/shops/:shopId/traces/:traceId/remove',
  params: inShop.extend({ traceId: id }),
  body: z.strictObject({ removed: z.boolean() }),
  reply: trace,
});
