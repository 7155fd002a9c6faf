import { MOST_POINTS, type Reading } from '#contracts/air.ts';
import { readingsOfZone } from '../db/air-readings.ts';
import { listZones } from '../db/air.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { readingView } from './read-air.ts';
import { readRange } from './read-range.ts';

const MOST_DAYS = 92;

/** @throws {Refusal} not-found, or bad-request for a span that is none or too long. */
export function listReadings(
  deps: Deps,
  actor: Actor,
  zoneId: string,
  asked: { from: string; to: string },
): Promise<{ total: number; readings: Reading[] }> {
  const span = readRange(asked, MOST_DAYS);
  return inShop(deps.db, actor, async (trx) => {
    if (!(await listZones(trx, actor.shopId)).some(({ id }) => id === zoneId)) throw notFound();
    const { total, readings } = await readingsOfZone(trx, actor.shopId, { zoneId, ...span, most: MOST_POINTS });
    return { total, readings: readings.map(readingView) };
  });
}
