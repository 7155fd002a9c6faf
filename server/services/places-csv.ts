import { v7 as uuid } from 'uuid';
import * as z from 'zod';
import { placeKind } from '#contracts/common.ts';
import type { CsvFault } from '#contracts/csv.ts';
import { placeFields, thingName, type PlaceFields, type Zone } from '#contracts/places.ts';
import { allOrNothing } from '../csv/all-or-nothing.ts';
import { csvNumber, csvYesNo } from '../csv/fields.ts';
import { readRows } from '../csv/read-rows.ts';
import { writeRows } from '../csv/write-rows.ts';
import { recordChange } from '../db/changes.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { findShopFrame } from '../db/people.ts';
import { insertPlace, loadPlaces, updatePlace, type PlaceRow } from '../db/places.ts';
import { loadZones, putZone } from '../db/zones.ts';
import type { Deps } from '../deps.ts';
import { localDayOf } from '../planning/local-time.ts';
import type { Actor } from '../policies.ts';
import { differing } from './set-up-change.ts';

const { units, bakeLimitCelsius, volumeM3, airFlowM3PerHour, clearanceMinutes } = placeFields.shape;
const number = <T extends z.ZodType<unknown, number>>(field: T) => csvNumber.pipe(field);
const row = z.object({
  name: thingName,
  kind: placeKind,
  zone: thingName.optional(),
  units: number(units),
  bakes: csvYesNo.default(false),
  bakeLimitCelsius: number(bakeLimitCelsius.unwrap()).optional(),
  volumeM3: number(volumeM3.unwrap()).optional(),
  /** Cubic metres an hour. */
  airFlow: number(airFlowM3PerHour.unwrap()).optional(),
  clearanceMinutes: number(clearanceMinutes).default(0),
});
type Row = z.output<typeof row>;
const keys = Object.keys(row.shape) as (keyof Row)[];

export function exportPlaces(deps: Deps, actor: Actor): Promise<{ fileName: string; csv: string }> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const zones = new Map((await loadZones(trx, shopId)).map(({ id, name }) => [id, name]));
    const places = (await loadPlaces(trx, shopId)).filter(({ retired }) => !retired);
    const { timeZone } = await findShopFrame(trx, shopId);
    const rows = places.map((place) => ({
      ...place,
      zone: place.zoneId === null ? null : (zones.get(place.zoneId) ?? null),
      airFlow: place.airFlowM3PerHour,
    }));
    return { fileName: `places-${localDayOf(deps.now(), timeZone)}.csv`, csv: writeRows(keys, rows) };
  });
}

/**
 * Lines are places by name: who is new is added, who is there is made as the line says, zones that are named and not there
 * yet are made. Nothing is taken out of use.
 */
export async function importPlaces(deps: Deps, actor: Actor, input: { csv: string; tryOnly: boolean }) {
  const read = readRows(input.csv, row);
  const { shopId } = actor;
  return allOrNothing(deps.db, actor, { lines: read.lines, tryOnly: input.tryOnly }, async (trx) => {
    const there = new Map((await loadPlaces(trx, shopId)).map((place) => [place.name.toLowerCase(), place]));
    const zones = new Map((await loadZones(trx, shopId)).map((zone) => [zone.name.toLowerCase(), zone]));
    const faults: CsvFault[] = [...read.faults];
    const ids = { added: [] as string[], changed: [] as string[] };
    const seen = new Set<string>();
    for (const { line, value } of read.rows) {
      const key = value.name.toLowerCase();
      if (seen.has(key)) faults.push({ line, column: 'name', message: 'This name is in the file twice.' });
      else if (there.get(key)?.retired)
        faults.push({ line, column: 'name', message: 'This place is retired; bring it back on the page first.' });
      else await take(trx, shopId, { value, before: there.get(key), zones }, ids);
      seen.add(key);
    }
    const all = [...ids.added, ...ids.changed];
    if (all.length > 0)
      await recordChange(trx, actor, { kind: 'shop-changed', ids: all, detail: { placesImported: all.length } });
    return { added: ids.added.length, changed: ids.changed.length, faults };
  });
}

type Line = { value: Row; before: PlaceRow | undefined; zones: Map<string, Zone> };

async function take(
  trx: Trx,
  shopId: string,
  { value, before, zones }: Line,
  ids: { added: string[]; changed: string[] },
): Promise<void> {
  const { zone, bakeLimitCelsius, volumeM3, airFlow, ...rest } = value;
  const fields: PlaceFields = {
    ...rest,
    zoneId: zone === undefined ? null : await zoneIdOf(trx, shopId, zone, zones),
    bakeLimitCelsius: bakeLimitCelsius ?? null,
    volumeM3: volumeM3 ?? null,
    airFlowM3PerHour: airFlow ?? null,
  };
  const id = before?.id ?? uuid();
  if (!before) {
    await insertPlace(trx, shopId, id, fields);
    ids.added.push(id);
    return;
  }
  const changed = differing<PlaceFields>(before, fields);
  if (Object.keys(changed).length === 0) return;
  await updatePlace(trx, shopId, id, changed);
  ids.changed.push(id);
}

async function zoneIdOf(trx: Trx, shopId: string, name: string, zones: Map<string, Zone>): Promise<string> {
  const known = zones.get(name.toLowerCase());
  if (known) return known.id;
  const made = await putZone(trx, shopId, { id: uuid(), name });
  if (!made) throw new Error(`zone ${name} is neither there nor can be made`);
  zones.set(name.toLowerCase(), made);
  return made.id;
}
