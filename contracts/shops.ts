import * as z from 'zod';
import { endpoint } from './endpoint.ts';
import { id, inShop, name } from './common.ts';
import { me } from './session.ts';

/** IANA name of a zone that this program knows. */
export const timeZone = z
  .string()
  .max(60)
  .refine((zone) => isZone(zone), 'is no time zone, such as Europe/Amsterdam');

function isZone(zone: string): boolean {
  try {
    // An offset such as +01:00 would be taken too, and would not know of summer time.
    new Intl.DateTimeFormat('en', { timeZone: zone });
    return /^[A-Z]/i.test(zone);
  } catch {
    return false;
  }
}

/** Opens a shop of one's own. Sent twice with the same id it is made once. */
export const createShop = endpoint({
  name: 'create-shop',
  method: 'POST',
  path: '/api/shops',
  body: z.strictObject({ id, name, timeZone }),
  reply: me,
});

/** Only a demo shop, only by an owner, who types the words. Everything in it is as on the first day afterwards. */
export const resetDemo = endpoint({
  name: 'reset-demo',
  method: 'POST',
  path: '/api/shops/:shopId/reset-demo',
  params: inShop,
  body: z.strictObject({ words: z.string().max(120) }),
});
/** What has to be typed. */
export const resetWords = 'reset the demo';
