import * as z from 'zod';
import { airFigures, airGate } from './air.ts';
import { endpoint } from './endpoint.ts';
import { attendance, id, inShop, instant, phaseKind, span } from './common.ts';
import { window } from './jobs.ts';

export const dayRow = z.strictObject({
  id,
  kind: z.enum(['booth', 'prep', 'rack', 'lamp', 'person']),
  name: z.string(),
  /** What else to know: units, zone, kilowatts and circuit, skills. Facts, not sentences. */
  units: z.number().int().nullable(),
  zone: z.string().nullable(),
  kilowatts: z.number().nullable(),
  circuitId: id.nullable(),
  /** Time in which it is not used, with why. */
  closed: z.array(
    span.extend({ kind: z.enum(['holiday', 'closure', 'maintenance', 'breakdown', 'absence']), label: z.string() }),
  ),
  /** People: shifts less breaks. Others: null (the shop's opening hours count). */
  working: z.array(span).nullable(),
});
export type DayRow = z.output<typeof dayRow>;

export const bar = z.strictObject({
  /** The stage: there is one bar for each booked stage. */
  id,
  jobId: id,
  jobNumber: z.number().int(),
  jobTitle: z.string(),
  partNames: z.string(),
  kind: z.string(),
  title: z.string(),
  way: z.string(),
  wayLabel: z.string(),
  placeId: id,
  personId: id.nullable(),
  personName: z.string().nullable(),
  needsHands: z.boolean(),
  lampIds: z.array(id),
  loadId: id,
  from: instant,
  to: instant,
  /** Until when the place stays taken: the part may not be moved yet, or the next stage is done where it stands. */
  heldTo: instant,
  phases: z.array(z.strictObject({ kind: phaseKind, from: instant, to: instant, attendance, lamp: z.boolean() })),
  window,
  pinned: z.boolean(),
  state: z.enum(['planned', 'running', 'done']),
  late: z.boolean(),
  promiseAt: instant.nullable(),
  /** The stages that are done where this one leaves the part, and move with it. */
  chain: z.array(id),
  /** In a draft: where the posted plan has it; null where it is the same or not posted. */
  posted: z.strictObject({ placeId: id, personId: id.nullable(), from: instant }).nullable(),
  /** In a draft: not in the posted plan at all. */
  added: z.boolean(),
});
export type Bar = z.output<typeof bar>;

export const unplacedJob = z.strictObject({
  jobId: id,
  jobNumber: z.number().int(),
  jobTitle: z.string(),
  stageTitle: z.string().nullable(),
  /** Null: nobody has asked the planner yet. */
  reason: z.string().nullable(),
});

export const planRun = z.strictObject({
  id,
  state: z.enum(['queued', 'running', 'done', 'stopped', 'failed']),
  scope: z.enum(['all', 'rest']),
  progress: z
    .strictObject({
      cost: z.number(),
      bound: z.number().nullable(),
      evaluations: z.number(),
      unplaced: z.number().int(),
    })
    .nullable(),
  failure: z.string().nullable(),
  seconds: z.number().int(),
  startedAt: instant.nullable(),
  finishedAt: instant.nullable(),
});
export type PlanRun = z.output<typeof planRun>;

export const dayView = z.strictObject({
  span,
  serverTime: instant,
  /** Number of the last change in the shop that this answer has seen. */
  seq: z.number().int(),
  shown: z.enum(['posted', 'draft']),
  posted: z.strictObject({
    number: z.number().int(),
    at: instant.nullable(),
    by: z.string().nullable(),
    /** Zones whose air is no longer what the plan was made with, by more than the shop lets pass. */
    changedAir: z.array(z.strictObject({ zoneId: id, name: z.string(), then: airFigures, now: airFigures })),
  }),
  draft: z
    .strictObject({
      id,
      version: z.number().int(),
      /** Bookings that differ from the posted plan. */
      changes: z.number().int(),
      /** Promises it misses. */
      late: z.number().int(),
      updatedAt: instant,
      updatedBy: z.string().nullable(),
      /** True: the posted plan has moved on since the draft was begun. */
      behind: z.boolean(),
    })
    .nullable(),
  open: z.array(span),
  rows: z.array(dayRow),
  /** The latest reading of each zone that has one of the last day. */
  air: z.array(airFigures.extend({ zoneId: id, name: z.string(), at: instant, gate: airGate })),
  circuits: z.array(z.strictObject({ id, name: z.string(), kilowatts: z.number() })),
  bars: z.array(bar),
  unplaced: z.array(unplacedJob),
  run: planRun.nullable(),
});
export type DayView = z.output<typeof dayView>;

export const readDay = endpoint({
  name: 'read-day',
  method: 'GET',
  path: '/api/shops/:shopId/day',
  params: inShop,
  /** At most 35 days. `plan=draft` shows the posted plan where there is no draft. */
  query: z.strictObject({ from: instant, to: instant, plan: z.enum(['posted', 'draft']).default('posted') }),
  reply: dayView,
});
