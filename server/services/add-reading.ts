import type * as z from 'zod';
import type { addReading as contract, written } from '#contracts/air.ts';
import { listZones } from '../db/air.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { faultOfMoment, writeReadings } from './write-readings.ts';

/**
 * A reading somebody has taken with a meter.
 * @throws {Refusal} not-found for a zone of no shop, bad-request for a moment to come, taken where the id is another's.
 */
export function addReading(
  deps: Deps,
  actor: Actor,
  zoneId: string,
  input: z.output<typeof contract.body>,
): Promise<z.output<typeof written>> {
  return inShop(deps.db, actor, async (trx) => {
    if (!(await listZones(trx, actor.shopId)).some(({ id }) => id === zoneId)) throw notFound();
    const at = new Date(input.at);
    const message = faultOfMoment(at, deps.now());
    if (message !== null) throw new Refusal('bad-request', { fields: [{ path: 'body.at', message }] });
    const { clashes, ...done } = await writeReadings(trx, actor, [{ ...input, zoneId, at, source: 'hand' }], {});
    if (clashes.length > 0) throw new Refusal('taken');
    return done;
  });
}
