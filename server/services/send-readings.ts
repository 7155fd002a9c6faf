import type * as z from 'zod';
import type { SentReading, written } from '#contracts/air.ts';
import type { ReadingRow } from '../db/air-readings.ts';
import { listZones } from '../db/air.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { KeyHolder } from './open-with-key.ts';
import { faultOfMoment, writeReadings } from './write-readings.ts';

type Fault = { path: string; message: string };

/**
 * Readings of a logger: all are taken or none. Every fault of the list is named, by its place in it.
 * @throws {Refusal} bad-request, or taken where an id stands for another reading.
 */
export function sendReadings(
  deps: Deps,
  holder: KeyHolder,
  sent: readonly SentReading[],
): Promise<z.output<typeof written>> {
  const scope = { shopId: holder.shopId, accountId: null };
  return inShop(deps.db, scope, async (trx) => {
    const zones = await listZones(trx, holder.shopId);
    const byName = new Map(zones.flatMap(({ id, name }) => [[id, id] as const, [name.toLowerCase(), id] as const]));
    const faults: Fault[] = [];
    const rows = sent.flatMap(({ zone, surfaceCelsius, at: text, ...reading }, i): ReadingRow[] => {
      const zoneId = byName.get(zone.toLowerCase());
      const at = new Date(text);
      const moment = faultOfMoment(at, deps.now());
      if (zoneId === undefined) faults.push({ path: `body.${i}.zone`, message: 'no such zone' });
      if (moment !== null) faults.push({ path: `body.${i}.at`, message: moment });
      return zoneId === undefined
        ? []
        : [{ ...reading, zoneId, at, surfaceCelsius: surfaceCelsius ?? null, source: 'key' }];
    });
    if (faults.length > 0) throw new Refusal('bad-request', { fields: faults });
    const { clashes, ...done } = await writeReadings(trx, scope, rows, { apiKeyId: holder.keyId });
    if (clashes.length > 0)
      throw new Refusal('taken', {
        fields: clashes.map((i) => ({ path: `body.${i}.id`, message: 'stands for another reading' })),
      });
    return done;
  });
}
