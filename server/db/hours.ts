import type { Closure, ClosureFields } from '#contracts/hours.ts';
import type { Opening } from './resources.ts';
import type { Trx } from './in-shop.ts';

/** Version of the opening hours as a whole; its row lock lets one at a time change them. */
export async function lockHours(trx: Trx, shopId: string): Promise<{ version: number; timeZone: string }> {
  const row = await trx('shop')
    .where({ id: shopId })
    .forNoKeyUpdate()
    .first<{ version: number; timeZone: string } | undefined>({ version: 'hours_version', timeZone: 'time_zone' });
  if (!row) throw new Error(`Shop ${shopId} is not there, or this transaction has not entered it.`);
  return row;
}

export async function readHoursVersion(trx: Trx, shopId: string): Promise<number> {
  const row = await trx('shop')
    .where({ id: shopId })
    .first<{ version: number } | undefined>({ version: 'hours_version' });
  return row?.version ?? 1;
}

/** @returns the new version */
export async function countHoursUp(trx: Trx, shopId: string): Promise<number> {
  const [row] = await trx('shop')
    .where({ id: shopId })
    .increment('hours_version', 1)
    .returning<{ hours_version: number }[]>('hours_version');
  return row?.hours_version ?? 1;
}

const openingColumns = { id: 'id', startsLocal: 'starts_local', rule: 'rule', minutes: 'minutes' } as const;

export const loadOpenings = (trx: Trx, shopId: string): Promise<Opening[]> =>
  trx('opening').where({ shop_id: shopId }).orderBy(['starts_local', 'id']).select<Opening[]>(openingColumns);

export async function insertOpenings(trx: Trx, shopId: string, openings: readonly Opening[]): Promise<void> {
  if (openings.length === 0) return;
  await trx('opening').insert(
    openings.map(({ id, startsLocal, rule, minutes }) => ({
      shop_id: shopId,
      id,
      starts_local: startsLocal,
      rule,
      minutes,
    })),
  );
}

export async function setOpeningRule(trx: Trx, shopId: string, id: string, rule: string): Promise<void> {
  await trx('opening').where({ shop_id: shopId, id }).update({ rule });
}

/** How many of them were there. */
export const deleteOpenings = (trx: Trx, shopId: string, ids: readonly string[]): Promise<number> =>
  trx('opening').where({ shop_id: shopId }).whereIn('id', ids).delete();

const closureColumns = {
  kind: 'kind',
  label: 'label',
  placeId: 'place_id',
  lampId: 'lamp_id',
  startsLocal: 'starts_local',
  rule: 'rule',
  minutes: 'minutes',
} as const satisfies Record<keyof ClosureFields, string>;

const readClosures = (trx: Trx, shopId: string) =>
  trx('closure')
    .where({ shop_id: shopId })
    .select<Closure[]>({ id: 'id', version: 'version', ...closureColumns });

export const loadClosures = (trx: Trx, shopId: string): Promise<Closure[]> =>
  readClosures(trx, shopId).orderBy(['starts_local', 'id']);

export async function lockClosure(trx: Trx, shopId: string, id: string): Promise<Closure | undefined> {
  const [row] = await readClosures(trx, shopId).andWhere({ id }).forUpdate();
  return row;
}

const closureRow = (fields: Partial<ClosureFields>): Record<string, unknown> =>
  Object.fromEntries(
    Object.entries(fields).map(([field, value]) => [closureColumns[field as keyof ClosureFields], value]),
  );

export async function insertClosure(trx: Trx, shopId: string, id: string, fields: ClosureFields): Promise<void> {
  await trx('closure').insert({ shop_id: shopId, id, ...closureRow(fields) });
}

/** Fields that are given; counts the version up. */
export async function updateClosure(
  trx: Trx,
  shopId: string,
  id: string,
  fields: Partial<ClosureFields>,
): Promise<void> {
  await trx('closure')
    .where({ shop_id: shopId, id })
    .update({ ...closureRow(fields), version: trx.raw('version + 1') });
}

export async function deleteClosure(trx: Trx, shopId: string, id: string): Promise<void> {
  await trx('closure').where({ shop_id: shopId, id }).delete();
}
