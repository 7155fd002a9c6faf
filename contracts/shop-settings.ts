import * as z from 'zod';
import { clashes } from './clashes.ts';
import { inShop, name } from './common.ts';
import { endpoint } from './endpoint.ts';

const version = z.number().int().min(1);
const weight = z.number().min(0).max(1_000_000);

/** Minutes of cleaning between two kinds of work in one place, as process sheets name their families. */
export const cleanup = z.strictObject({
  from: z.string().trim().min(1).max(40),
  to: z.string().trim().min(1).max(40),
  minutes: z.number().int().min(1).max(480),
});
export type Cleanup = z.output<typeof cleanup>;

/** What a plan costs: a unit per minute or per piece, as server/planner/types.ts says. */
export const objective = z.strictObject({
  tardiness: weight,
  flow: weight,
  makespan: weight,
  booth: weight,
  moves: weight,
  unplaced: weight.min(1, 'leaving a job out must cost something'),
});
export type Objective = z.output<typeof objective>;

export const shopFields = z.strictObject({
  name,
  timeZone: z.string().min(1).max(60),
  temperatureUnit: z.enum(['C', 'F']),
  clock: z.enum(['24', '12']),
  lampMoveMinutes: z.number().int().min(0).max(240),
  freezeMinutes: z.number().int().min(0).max(1440),
  trainingBlocks: z.boolean(),
  cleanups: z
    .array(cleanup)
    .max(200)
    .refine((rows) => new Set(rows.map(({ from, to }) => JSON.stringify([from, to]))).size === rows.length, {
      message: 'the same pair is there twice',
    }),
  objective,
});
export type ShopFields = z.output<typeof shopFields>;

/** How letters leave, as the environment says. Never a password: only where to and as whom. */
export const mailSettings = z.strictObject({
  from: z.string(),
  host: z.string().nullable(),
  localMailbox: z.boolean(),
});

export const shopSettings = shopFields.extend({
  version,
  /** Families that process sheets in use name. */
  families: z.array(z.string()),
  /** Only for who may change it. */
  mail: mailSettings.nullable(),
});
export type ShopSettings = z.output<typeof shopSettings>;

export const readShop = endpoint({
  name: 'read-shop',
  method: 'GET',
  path: '/api/shops/:shopId/settings',
  params: inShop,
  reply: shopSettings,
});
export const changeShop = endpoint({
  name: 'change-shop',
  method: 'PATCH',
  path: '/api/shops/:shopId/settings',
  params: inShop,
  body: shopFields.partial().extend({ version }),
  reply: z.strictObject({ shop: shopSettings, clashes }),
});
/** To the address of who asks. Where it stands is seen under letters sent. */
export const sendTestLetter = endpoint({
  name: 'send-test-letter',
  method: 'POST',
  path: '/api/shops/:shopId/test-letter',
  params: inShop,
  reply: z.strictObject({ to: z.string() }),
});
