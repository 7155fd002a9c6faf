import type { Trx } from '#server/db/in-shop.ts';
import { insertCoating } from '#server/db/coatings.ts';
import { insertSheet } from '#server/db/sheets.ts';
import { coatings } from '#server/starter/coatings.ts';
import { sheets } from '#server/starter/sheets/index.ts';
import type { DemoCalendar } from './calendar.ts';
import { demoId } from './ids.ts';
import { people, shifts } from './people.ts';
import { storedBody } from './stored-body.ts';
import { circuits, lamps, maintenance, opening, places, shop, weekdays } from './shop.ts';

/** Set-up of the demo shop: places, lamps, calendars, people, coatings, process sheets. */
export async function putInShop(trx: Trx, shopId: string, calendar: DemoCalendar): Promise<void> {
  const row = {
    id: shopId,
    name: shop.name,
    time_zone: shop.timeZone,
    lamp_move_minutes: shop.lampMoveMinutes,
    freeze_minutes: shop.freezeMinutes,
    cleanups: JSON.stringify(shop.cleanups),
    objective: JSON.stringify(shop.objective),
    is_demo: true,
  };
  // Of a shop that is put back the numbers begin anew; those of its changes go on, for who is listening.
  await trx('shop')
    .insert(row)
    .onConflict('id')
    .merge({ ...row, training_blocks: true, plan_number: 0, job_number: 0 });
  await putInPlaces(trx, shopId);
  await putInLamps(trx, shopId);
  await putInCalendars(trx, shopId, calendar);
  await putInPeople(trx, shopId, calendar);
  for (const { key, ...coating } of coatings)
    await insertCoating(trx, shopId, { ...coating, id: demoId('coating', key) });
  for (const sheet of sheets)
    await insertSheet(trx, shopId, {
      id: demoId('sheet', sheet.key),
      versionId: demoId('sheet', `${sheet.key}/1`),
      name: sheet.name,
      at: calendar.at(-30, '10:00'),
      body: storedBody(sheet),
    });
}

async function putInPlaces(trx: Trx, shopId: string): Promise<void> {
  const zones = [...new Set(places.flatMap(({ zone }) => zone ?? []))];
  await trx('zone').insert(zones.map((name) => ({ shop_id: shopId, id: demoId('zone', name), name })));
  await trx('place').insert(
    places.map(({ name, kind, zone, units, booth }, position) => ({
      shop_id: shopId,
      id: demoId('place', name),
      kind,
      name,
      zone_id: zone === null ? null : demoId('zone', zone),
      units,
      bakes: booth !== undefined,
      bake_limit_celsius: booth?.limit ?? null,
      volume_m3: booth?.volume ?? null,
      air_flow_m3_per_hour: booth?.flow ?? null,
      clearance_minutes: booth?.clearance ?? 0,
      position,
    })),
  );
}

async function putInLamps(trx: Trx, shopId: string): Promise<void> {
  await trx('circuit').insert(
    circuits.map(({ name, kilowatts }) => ({ shop_id: shopId, id: demoId('circuit', name), name, kilowatts })),
  );
  await trx('lamp').insert(
    lamps.map(({ name, circuit, kilowatts, wave }, position) => ({
      shop_id: shopId,
      id: demoId('lamp', name),
      name,
      circuit_id: demoId('circuit', circuit),
      kilowatts,
      wave,
      position,
    })),
  );
}

async function putInCalendars(trx: Trx, shopId: string, calendar: DemoCalendar): Promise<void> {
  await trx('opening').insert({
    shop_id: shopId,
    id: demoId('opening', 'weekdays'),
    starts_local: calendar.recurringFrom(opening.at),
    rule: weekdays,
    minutes: opening.minutes,
  });
  await trx('closure').insert(
    maintenance.map(({ label, place, at, rule, minutes }) => ({
      shop_id: shopId,
      id: demoId('closure', place),
      kind: 'maintenance',
      label,
      place_id: demoId('place', place),
      starts_local: calendar.recurringFrom(at),
      rule,
      minutes,
    })),
  );
}

async function putInPeople(trx: Trx, shopId: string, calendar: DemoCalendar): Promise<void> {
  await trx('person').insert(
    people.map(({ name, skills, trained }, position) => ({
      shop_id: shopId,
      id: demoId('person', name),
      name,
      skills,
      spray_trained_on: trained === null ? null : calendar.monthsAgo(trained),
      position,
    })),
  );
  await trx('shift').insert(
    people.map(({ name, shift }) => ({
      shop_id: shopId,
      id: demoId('shift', name),
      person_id: demoId('person', name),
      starts_local: calendar.recurringFrom(shifts[shift].at),
      rule: weekdays,
      minutes: shifts[shift].minutes,
      breaks: JSON.stringify(shifts[shift].breaks),
    })),
  );
}
