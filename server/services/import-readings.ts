import { v5 } from 'uuid';
import * as z from 'zod';
import { airCelsius, airHumidity, surfaceCelsius } from '#contracts/air.ts';
import type { CsvFault, CsvReport } from '#contracts/csv.ts';
import { allOrNothing } from '../csv/all-or-nothing.ts';
import { csvNumber } from '../csv/fields.ts';
import { readRows, type ReadRow } from '../csv/read-rows.ts';
import type { ReadingRow } from '../db/air-readings.ts';
import { listZones } from '../db/air.ts';
import { loadTimeZone } from '../db/shop-zone.ts';
import type { Deps } from '../deps.ts';
import { instantOf, readLocal } from '../planning/local-time.ts';
import type { Actor } from '../policies.ts';
import { faultOfMoment, writeReadings } from './write-readings.ts';

const line = z.object({
  zone: z.string(),
  at: z.string(),
  celsius: csvNumber.pipe(airCelsius),
  humidity: csvNumber.pipe(airHumidity),
  surfaceCelsius: csvNumber.pipe(surfaceCelsius).optional(),
  id: z.uuid().optional(),
});
type Line = z.output<typeof line>;

/** Readings from a file, all or none. A line without an id gets one from zone and moment: the same file again adds nothing. */
export function importReadings(
  deps: Deps,
  actor: Actor,
  { csv, tryOnly }: { csv: string; tryOnly: boolean },
): Promise<CsvReport> {
  const { lines, rows, faults } = readRows(csv, line);
  return allOrNothing(deps.db, actor, { lines, tryOnly }, async (trx) => {
    if (faults.length > 0) return { added: 0, changed: 0, faults };
    const zones = new Map((await listZones(trx, actor.shopId)).map(({ id, name }) => [name.toLowerCase(), id]));
    const timeZone = await loadTimeZone(trx, actor.shopId);
    const read = rows.map((row) => toReading(row, zones, timeZone, deps.now()));
    const wrong = read.flatMap((one) => ('faults' in one ? one.faults : []));
    if (wrong.length > 0) return { added: 0, changed: 0, faults: wrong };
    const readings = read.flatMap((one) => ('reading' in one ? [one.reading] : []));
    const { written, clashes } = await writeReadings(trx, actor, readings, {});
    return {
      added: written,
      changed: 0,
      faults: clashes.map((i) => ({
        line: rows[i]?.line ?? 0,
        column: null,
        message: 'There is another reading of this zone and moment, or of this id.',
      })),
    };
  });
}

function toReading(
  { line: at, value }: ReadRow<Line>,
  zones: ReadonlyMap<string, string>,
  timeZone: string,
  now: Date,
): { reading: ReadingRow } | { faults: CsvFault[] } {
  const faults: CsvFault[] = [];
  const zoneId = zones.get(value.zone.toLowerCase());
  if (zoneId === undefined) faults.push({ line: at, column: 'zone', message: 'There is no zone of this name.' });
  const moment = readMoment(value.at, timeZone);
  const wrong = moment === null ? 'Write the moment as 2027-03-31 14:05 or 2027-03-31T12:05:00Z.' : null;
  const fault = wrong ?? (moment && faultOfMoment(moment, now));
  if (fault !== null) faults.push({ line: at, column: 'at', message: wrong ?? `This moment ${fault}.` });
  if (zoneId === undefined || moment === null || faults.length > 0) return { faults };
  return {
    reading: {
      id: value.id ?? v5(`${zoneId} ${moment.toISOString()}`, zoneId),
      zoneId,
      at: moment,
      celsius: value.celsius,
      humidity: value.humidity,
      surfaceCelsius: value.surfaceCelsius ?? null,
      source: 'csv',
    },
  };
}

/** An instant with its offset, or the shop's wall clock; never what the server's clock makes of it. */
function readMoment(text: string, timeZone: string): Date | null {
  if (z.iso.datetime({ offset: true }).safeParse(text).success) return new Date(text);
  const local = /^(\d{4}-\d\d-\d\d)[T ](\d\d:\d\d)(?::\d\d)?$/.exec(text);
  if (!local || !z.iso.datetime({ local: true }).safeParse(`${local[1]}T${local[2]}:00`).success) return null;
  return instantOf(readLocal(`${local[1]}T${local[2]}`), timeZone);
}
