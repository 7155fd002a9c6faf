import { insertReadings, type ReadingRow } from '#server/db/air-readings.ts';
import type { Trx } from '#server/db/in-shop.ts';
import type { DemoCalendar } from './calendar.ts';
import { demoId, spread } from './ids.ts';
import { places } from './shop.ts';

const HALF_HOUR = 30 * 60_000;
const READINGS = 7 * 48;
const LAST_READ = 12 * 60_000;

/** A week of half-hourly readings by a logger in each zone: a workshop that is heated by day and cools at night. */
export async function putInAir(trx: Trx, shopId: string, { now }: DemoCalendar): Promise<void> {
  const zones = [...new Set(places.flatMap(({ zone }) => zone ?? []))];
  const readings = zones.flatMap((zone) =>
    Array.from({ length: READINGS }, (_, back) =>
      readingOf(zone, new Date(now.getTime() - LAST_READ - back * HALF_HOUR)),
    ),
  );
  await insertReadings(trx, shopId, readings);
}

function readingOf(zone: string, at: Date): ReadingRow {
  const hour = at.getUTCHours() + at.getUTCMinutes() / 60;
  // Warmest at three in the afternoon, coldest at three in the morning.
  const day = Math.cos(((hour - 15) / 24) * 2 * Math.PI);
  const booth = zone.startsWith('Booth');
  const chance = (spread(`${zone} ${at.toISOString().slice(0, 13)}`, 100) - 50) / 100;
  const celsius = round((booth ? 20.4 : 19) + day * (booth ? 0.8 : 1.9) + chance * 0.6, 1);
  const humidity = round((booth ? 47 : 53) - day * 5 + chance * 4, 0);
  return {
    id: demoId('reading', `${zone} ${at.toISOString()}`),
    zoneId: demoId('zone', zone),
    at,
    celsius,
    humidity,
    surfaceCelsius: booth ? round(celsius - 0.9, 1) : null,
    source: 'key',
  };
}

const round = (value: number, digits: number): number => Number(value.toFixed(digits));
