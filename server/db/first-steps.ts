import { v7 as uuid } from 'uuid';
import type { FirstSteps } from '#contracts/first-steps.ts';
import type { Trx } from './in-shop.ts';

type Has = FirstSteps['has'] & { isDemo: boolean; plans: number };

/** What a shop has so far, retired rows left out. */
export async function loadFirstSteps(trx: Trx, shopId: string): Promise<Has> {
  const { rows } = await trx.raw<{ rows: Has[] }>(
    `select is_demo as "isDemo",
       (select count(*)::int from opening where shop_id = :shopId) as openings,
       (select count(*)::int from place where shop_id = :shopId and kind = 'booth' and retired_at is null) as booths,
       (select count(*)::int from place where shop_id = :shopId and kind = 'prep' and retired_at is null) as stations,
       (select count(*)::int from lamp where shop_id = :shopId and retired_at is null) as lamps,
       (select count(*)::int from person where shop_id = :shopId and retired_at is null) as people,
       (select count(*)::int from coating where shop_id = :shopId and retired_at is null) as coatings,
       (select count(*)::int from process_sheet where shop_id = :shopId and retired_at is null) as sheets,
       (select count(*)::int from job where shop_id = :shopId) as jobs,
       (select count(*)::int from plan_run where shop_id = :shopId) + plan_number as plans
     from shop where id = :shopId`,
    { shopId },
  );
  const row = rows[0];
  if (!row) throw new Error(`Shop ${shopId} is not there, or this transaction has not entered it.`);
  return row;
}

export async function setTimeZone(trx: Trx, shopId: string, timeZone: string): Promise<void> {
  await trx('shop').where({ id: shopId }).update({ time_zone: timeZone });
}

export async function setTrainingBlocks(trx: Trx, shopId: string, trainingBlocks: boolean): Promise<void> {
  await trx('shop').where({ id: shopId }).update({ training_blocks: trainingBlocks });
}

export async function insertOpening(
  trx: Trx,
  shopId: string,
  opening: { startsLocal: string; rule: string; minutes: number },
): Promise<void> {
  await trx('opening').insert({
    shop_id: shopId,
    id: uuid(),
    starts_local: opening.startsLocal,
    rule: opening.rule,
    minutes: opening.minutes,
  });
}

/** A zone of that name, made where there is none. */
export async function zoneNamed(trx: Trx, shopId: string, name: string): Promise<string> {
  await trx('zone').insert({ shop_id: shopId, id: uuid(), name }).onConflict(['shop_id', 'name']).ignore();
  const row = await trx('zone').where({ shop_id: shopId, name }).first<{ id: string }>('id');
  return row.id;
}

export type NewPlace = {
  kind: 'booth' | 'prep' | 'rack';
  name: string;
  zoneId: string | null;
  units: number;
  position: number;
  booth: { volumeM3: number; airFlowM3PerHour: number | null; limitCelsius: number; clearanceMinutes: number } | null;
};

/** Leaves alone what has the name already. */
export async function insertPlaces(trx: Trx, shopId: string, places: readonly NewPlace[]): Promise<void> {
  await trx('place')
    .insert(
      places.map(({ kind, name, zoneId, units, position, booth }) => ({
        shop_id: shopId,
        id: uuid(),
        kind,
        name,
        zone_id: zoneId,
        units,
        position,
        bakes: booth !== null && booth.airFlowM3PerHour !== null,
        bake_limit_celsius: booth?.limitCelsius ?? null,
        volume_m3: booth?.volumeM3 ?? null,
        air_flow_m3_per_hour: booth?.airFlowM3PerHour ?? null,
        clearance_minutes: booth?.clearanceMinutes ?? 0,
      })),
    )
    .onConflict(['shop_id', 'name'])
    .ignore();
}

export async function insertLamps(
  trx: Trx,
  shopId: string,
  circuit: { name: string; kilowatts: number },
  lamps: readonly { name: string; kilowatts: number; position: number }[],
): Promise<void> {
  await trx('circuit')
    .insert({ shop_id: shopId, id: uuid(), name: circuit.name, kilowatts: circuit.kilowatts })
    .onConflict(['shop_id', 'name'])
    .ignore();
  const { id } = await trx('circuit').where({ shop_id: shopId, name: circuit.name }).first<{ id: string }>('id');
  await trx('lamp')
    .insert(lamps.map((lamp) => ({ shop_id: shopId, id: uuid(), circuit_id: id, wave: 'short', ...lamp })))
    .onConflict(['shop_id', 'name'])
    .ignore();
}

export async function findOwnMember(trx: Trx, shopId: string, accountId: string): Promise<string | undefined> {
  const row = await trx('membership')
    .where({ shop_id: shopId, account_id: accountId })
    .first<{ id: string } | undefined>('id');
  return row?.id;
}
