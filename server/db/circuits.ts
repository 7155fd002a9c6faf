import type { Circuit, CircuitFields } from '#contracts/lamps.ts';
import type { Trx } from './in-shop.ts';

const columns = {
  name: 'name',
  kilowatts: 'kilowatts',
  volts: 'volts',
  phases: 'phases',
  breakerAmperes: 'breaker_amperes',
} as const satisfies Record<keyof CircuitFields, string>;

const read = (trx: Trx, shopId: string) =>
  trx('circuit')
    .where({ shop_id: shopId })
    .select<Circuit[]>({ id: 'id', version: 'version', ...columns });

const rowOf = (fields: Partial<CircuitFields>): Record<string, unknown> =>
  Object.fromEntries(Object.entries(fields).map(([field, value]) => [columns[field as keyof CircuitFields], value]));

export const loadCircuits = (trx: Trx, shopId: string): Promise<Circuit[]> => read(trx, shopId).orderBy('name');

export async function lockCircuit(trx: Trx, shopId: string, id: string): Promise<Circuit | undefined> {
  const [row] = await read(trx, shopId).andWhere({ id }).forUpdate();
  return row;
}

export async function insertCircuit(trx: Trx, shopId: string, id: string, fields: CircuitFields): Promise<void> {
  await trx('circuit').insert({ shop_id: shopId, id, ...rowOf(fields) });
}

/** Fields that are given; counts the version up. */
export async function updateCircuit(
  trx: Trx,
  shopId: string,
  id: string,
  fields: Partial<CircuitFields>,
): Promise<void> {
  await trx('circuit')
    .where({ shop_id: shopId, id })
    .update({ ...rowOf(fields), version: trx.raw('version + 1') });
}

export async function deleteCircuit(trx: Trx, shopId: string, id: string): Promise<void> {
  await trx('circuit').where({ shop_id: shopId, id }).delete();
}

/** Lamps that hang on the circuit, retired ones too. */
export const lampsOnCircuit = (trx: Trx, shopId: string, id: string): Promise<{ id: string; name: string }[]> =>
  trx('lamp')
    .where({ shop_id: shopId, circuit_id: id })
    .orderBy('name')
    .select<{ id: string; name: string }[]>('id', 'name');
