import * as z from 'zod';
import { endpoint } from './endpoint.ts';
import { id, inShop, instant, placeKind } from './common.ts';

const hours = z.number().min(0);
export const placeUse = z.strictObject({
  placeId: id,
  name: z.string(),
  kind: placeKind,
  /** Hours by what the place did in the range, up to now from what happened and from the plan where nothing is recorded. */
  hours: z.strictObject({
    setup: hours,
    work: hours,
    spray: hours,
    flash: hours,
    purge: hours,
    bake: hours,
    cool: hours,
    held: hours,
  }),
  /** Open hours of the shop in the range, less closures of the place. */
  openHours: hours,
  /** Busy minutes that lie inside open hours, as hours. */
  busyOpenHours: hours,
  bookings: z.number().int(),
  /** How many of the bookings have recorded times. */
  recorded: z.number().int(),
});
export type PlaceUse = z.output<typeof placeUse>;
export const readUse = endpoint({
  name: 'read-use',
  method: 'GET',
  path: '/api/shops/:shopId/use',
  params: inShop,
  query: z.strictObject({ from: instant, to: instant }),
  reply: z.strictObject({ from: instant, to: instant, serverTime: instant, places: z.array(placeUse) }),
});
