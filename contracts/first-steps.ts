import * as z from 'zod';
import { endpoint } from './endpoint.ts';
import { id, inShop, instant, localDay, name, note } from './common.ts';
import { skills } from './people.ts';
import { weekdays } from './recurrence.ts';
import { timeZone } from './shops.ts';

/** In the order in which an empty shop is led through them. */
export const firstStep = z.enum(['hours', 'places', 'people', 'sheets', 'job']);
export type FirstStep = z.output<typeof firstStep>;

const clockTime = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, 'must be a time such as 07:00');
const hoursStep = z
  .strictObject({
    timeZone,
    days: z.array(z.enum(weekdays)).min(1).max(7),
    from: clockTime,
    to: clockTime,
  })
  .refine(({ from, to }) => from < to, { path: ['to'], message: 'ends before it begins' });

/** Cubic metres, cubic metres an hour, degrees Celsius, kilowatts. Air flow null: not known, so no heat is planned there. */
const placesStep = z.strictObject({
  booths: z.number().int().min(1).max(6),
  volumeM3: z.number().min(10).max(2_000),
  airFlowM3PerHour: z.number().min(100).max(200_000).nullable(),
  bakeLimitCelsius: z.number().min(40).max(100),
  clearanceMinutes: z.number().int().min(0).max(240),
  stations: z.number().int().min(1).max(12),
  lamps: z.number().int().min(0).max(12),
  lampKilowatts: z.number().min(0.1).max(50),
  circuitKilowatts: z.number().min(0.1).max(500),
});

const newcomer = z.strictObject({
  name,
  skills,
  sprayTrainedOn: localDay.nullable(),
  /** This is the owner who is asking: their account works as this person. */
  isMe: z.boolean(),
});
const peopleStep = z
  .strictObject({
    people: z.array(newcomer).min(1).max(20),
    from: clockTime,
    to: clockTime,
    /** Spray training is only warned of until its dates are entered. */
    onlyWarn: z.boolean(),
  })
  .refine(({ from, to }) => from < to, { path: ['to'], message: 'ends before it begins' })
  .refine(({ people }) => people.filter(({ isMe }) => isMe).length <= 1, {
    path: ['people'],
    message: 'only one of them can be you',
  });

const sheetsStep = z.strictObject({ sheets: z.array(z.string().max(60)).min(1).max(50) });

const jobStep = z.strictObject({
  jobId: id,
  runId: id,
  sheetId: id,
  title: name,
  vehicle: z.string().trim().max(120),
  notes: note,
  promiseAt: instant.nullable(),
});

export type HoursStep = z.output<typeof hoursStep>;
export type PlacesStep = z.output<typeof placesStep>;
export type PeopleStep = z.output<typeof peopleStep>;
export type JobStep = z.output<typeof jobStep>;

/** What is done is read from what the shop has; nothing else remembers it. */
export const firstSteps = z.strictObject({
  steps: z.array(z.strictObject({ step: firstStep, done: z.boolean() })),
  isDemo: z.boolean(),
  /** The demo is being put back; everything is as it was until that is done. */
  resetting: z.boolean(),
  /** What is there, in figures. */
  has: z.strictObject({
    openings: z.number().int(),
    booths: z.number().int(),
    stations: z.number().int(),
    lamps: z.number().int(),
    people: z.number().int(),
    coatings: z.number().int(),
    sheets: z.number().int(),
    jobs: z.number().int(),
  }),
  /** The starter set: common practice, to be checked against makers' sheets and local code. */
  starter: z.array(z.strictObject({ key: z.string(), name: z.string(), summary: z.string() })),
});
export type FirstSteps = z.output<typeof firstSteps>;

export const readFirstSteps = endpoint({
  name: 'read-first-steps',
  method: 'GET',
  path: '/api/shops/:shopId/first-steps',
  params: inShop,
  reply: firstSteps,
});

const step = <Name extends FirstStep, Body extends z.ZodType>(name: Name, body: Body) =>
  endpoint({
    name: `take-${name}`,
    method: 'POST',
    path: `/api/shops/:shopId/first-steps/${name}`,
    params: inShop,
    body,
    reply: firstSteps,
  });
/** Each step is one transaction. A step that is done already is left as it is. */
export const takeHours = step('hours', hoursStep);
export const takePlaces = step('places', placesStep);
export const takePeople = step('people', peopleStep);
export const takeSheets = step('sheets', sheetsStep);
/** The first job, and the first run of the planner over it. */
export const takeJob = step('job', jobStep);
