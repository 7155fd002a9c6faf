import * as z from 'zod';
import { airFigures, airGate } from './air.ts';
import { endpoint } from './endpoint.ts';
import { id, inShop, instant, localDay, phaseKind } from './common.ts';
import { window } from './jobs.ts';

/** The latest reading where something is to be sprayed, against the gate; null: no zone, or nobody has measured. */
export const sprayAir = z.strictObject({
  zoneName: z.string().nullable(),
  reading: airFigures.extend({ at: instant }).nullable(),
  gate: airGate.nullable(),
});
export type SprayAir = z.output<typeof sprayAir>;

export const benchStage = z.strictObject({
  id,
  version: z.number().int(),
  jobId: id,
  jobNumber: z.number().int(),
  jobTitle: z.string(),
  vehicle: z.string(),
  partNames: z.string(),
  colourNote: z.string(),
  kind: z.string(),
  title: z.string(),
  wayLabel: z.string(),
  placeName: z.string(),
  lampNames: z.array(z.string()),
  from: instant,
  to: instant,
  phases: z.array(z.strictObject({ kind: phaseKind, from: instant, to: instant })),
  window,
  state: z.enum(['waiting', 'running', 'done']),
  startedAt: instant.nullable(),
  finishedAt: instant.nullable(),
  /** True: what comes before it in the job is done, so it can be started. */
  ready: z.boolean(),
  sharedWith: z.array(z.string()),
  /** Null: nothing is sprayed in it. */
  air: sprayAir.nullable(),
});
export type BenchStage = z.output<typeof benchStage>;

export const benchView = z.strictObject({
  serverTime: instant,
  day: localDay,
  person: z.strictObject({ id, name: z.string() }).nullable(),
  working: z.array(z.strictObject({ from: instant, to: instant })),
  stages: z.array(benchStage),
});
export type BenchView = z.output<typeof benchView>;

/** A painter's own stages of a day. A lead may look at somebody else's bench with `personId`. */
export const readBench = endpoint({
  name: 'read-bench',
  method: 'GET',
  path: '/api/shops/:shopId/bench',
  params: inShop,
  query: z.strictObject({ day: localDay.optional(), personId: id.optional() }),
  reply: benchView,
});

const inStage = inShop.extend({ stageId: id });
const tap = z.strictObject({ version: z.number().int() });
export const startStage = endpoint({
  name: 'start-stage',
  method: 'POST',
  path: '/api/shops/:shopId/stages/:stageId/start',
  params: inStage,
  /** `overrule`: why it is sprayed although the dew-point gate is shut; only who leads may. */
  body: tap.extend({ overrule: z.string().trim().min(3).max(400).optional() }),
  /** `air`: what the gate saw; null where nothing is sprayed. */
  reply: z.strictObject({ version: z.number().int(), air: sprayAir.nullable() }),
});
export const finishStage = endpoint({
  name: 'finish-stage',
  method: 'POST',
  path: '/api/shops/:shopId/stages/:stageId/finish',
  params: inStage,
  body: tap,
  reply: z.strictObject({ version: z.number().int() }),
});
