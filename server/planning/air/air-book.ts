import type { AirFigures } from '#contracts/air.ts';
import type { CoatingSheet } from '#contracts/coatings.ts';
import type { AirOfShop } from '#server/db/air.ts';
import type { Opening } from '#server/db/resources.ts';
import { airAt, defaultAir, expectedHours, HOURS } from './expected-air.ts';
import { leastMinutes, minutesInAir, type Ambient } from './minutes-in-air.ts';

/** A time of a process sheet that depends on the air. */
export type AirTime = { minutes: number; ambient: Ambient; coatingId: string | null };
export type Airy = { zoneId: string | null };

/** How long times take in the air that is expected where they pass. */
export type AirBook = {
  /**
   * Whole minutes, the most of all these places. A flash follows work, so of a schedule only the hours count in which the
   * shop is open; what dries through may do so at night.
   */
  minutesAt(time: AirTime, places: readonly Airy[]): number;
  least(time: AirTime): number;
};

type Sources = { air: AirOfShop; coatings: ReadonlyMap<string, CoatingSheet>; openings: readonly Opening[]; now: Date };

export function airBook({ air, coatings, openings, now }: Sources): AirBook {
  const open = openHours(openings);
  const usual = [defaultAir(air.settings)];
  const zones = new Map(air.zones.map((zone) => [zone.id, expectedHours(zone, air.settings, now)]));
  const known = new Map<string, number>();
  const sheetOf = ({ coatingId }: AirTime): CoatingSheet | null =>
    (coatingId === null ? null : coatings.get(coatingId)) ?? null;
  const inZone = (time: AirTime, zoneId: string | null): number => {
    const key = `${time.coatingId} ${time.ambient} ${time.minutes} ${zoneId}`;
    const before = known.get(key);
    if (before !== undefined) return before;
    const hours = (zoneId === null ? undefined : zones.get(zoneId)) ?? usual;
    const airs: AirFigures[] = time.ambient === 'air' ? hours : different(open.map((hour) => airAt(hours, hour)));
    const minutes = Math.max(...airs.map((one) => minutesInAir(time.minutes, time.ambient, sheetOf(time), one)));
    known.set(key, minutes);
    return minutes;
  };
  return {
    minutesAt: (time, places) =>
      Math.max(...(places.length > 0 ? places : [{ zoneId: null }]).map(({ zoneId }) => inZone(time, zoneId))),
    least: (time) => leastMinutes(time.minutes, time.ambient, sheetOf(time)),
  };
}

const different = (airs: readonly AirFigures[]): AirFigures[] => [...new Set(airs)];

/** Hours of the wall clock that any opening touches; all where none is known. */
export function openHours(openings: readonly Pick<Opening, 'startsLocal' | 'minutes'>[]): number[] {
  const touched = new Set<number>();
  for (const { startsLocal, minutes } of openings) {
    const from = Number(startsLocal.slice(11, 13)) * 60 + Number(startsLocal.slice(14, 16));
    for (let hour = Math.floor(from / 60); hour * 60 < from + minutes && hour < 48; hour += 1) touched.add(hour % 24);
  }
  return touched.size === 0 ? HOURS : [...touched].sort((a, b) => a - b);
}
