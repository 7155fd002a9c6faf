import { insertReadings, readingsById, type ReadingRow } from '../db/air-readings.ts';
import { recordChange } from '../db/changes.ts';
import type { Scope, Trx } from '../db/in-shop.ts';
import { lockShop } from '../db/locks.ts';

/** A sensor's clock may run a little ahead. */
const AHEAD = 15 * 60_000;
const EARLIEST = Date.UTC(2000, 0, 1);

export type Written = {
  written: number;
  duplicate: number;
  /** Positions in what was sent whose id stands for another reading. Where there is one nothing was written. */
  clashes: number[];
};

/**
 * Writes readings once, whoever sends them however often: an id that is there with the same content is a duplicate. One
 * writer of a shop at a time, see db/air-readings.ts.
 */
export async function writeReadings(
  trx: Trx,
  scope: Scope,
  sent: readonly ReadingRow[],
  by: { apiKeyId?: string },
): Promise<Written> {
  await lockShop(trx, scope.shopId);
  const ids = [...new Set(sent.map(({ id }) => id))];
  const known = new Map((await readingsById(trx, scope.shopId, ids)).map((row) => [row.id, row]));
  const fresh: ReadingRow[] = [];
  const clashes: number[] = [];
  for (const [i, reading] of sent.entries()) {
    const there = known.get(reading.id);
    if (there && !sameReading(there, reading)) clashes.push(i);
    if (there) continue;
    known.set(reading.id, reading);
    fresh.push(reading);
  }
  if (clashes.length > 0) return { written: 0, duplicate: 0, clashes };
  if (fresh.length > 0) {
    await insertReadings(trx, scope.shopId, fresh);
    const zones = [...new Set(fresh.map(({ zoneId }) => zoneId))];
    await recordChange(trx, scope, { kind: 'air-read', ids: zones, detail: { readings: fresh.length, ...by } });
  }
  return { written: fresh.length, duplicate: sent.length - fresh.length, clashes };
}

/** The same air at the same place and moment; by which way it came does not matter. */
const sameReading = (a: ReadingRow, b: ReadingRow): boolean =>
  a.zoneId === b.zoneId &&
  a.at.getTime() === b.at.getTime() &&
  a.celsius === b.celsius &&
  a.humidity === b.humidity &&
  a.surfaceCelsius === b.surfaceCelsius;

/** What is wrong with the moment of a reading; null: nothing. */
export function faultOfMoment(at: Date, now: Date): string | null {
  if (at.getTime() > now.getTime() + AHEAD) return 'lies in the future';
  return at.getTime() < EARLIEST ? 'lies before the year 2000' : null;
}
