import { coatingKind, coatingSheet, emptySheet, type Coating, type CoatingSheet } from '#contracts/coatings.ts';
import type { Trx } from './in-shop.ts';

type Row = { id: string; name: string; kind: string; sheet: Record<string, unknown> };

/** The shop's coatings with what their data sheets say, by name. */
export async function listCoatings(trx: Trx, shopId: string): Promise<Coating[]> {
  const rows = await trx('coating')
    .where({ shop_id: shopId })
    .whereNull('retired_at')
    .orderBy('name')
    .select<Row[]>('id', 'name', 'kind', 'sheet');
  return rows.map(present);
}

export async function insertCoating(trx: Trx, shopId: string, coating: Coating): Promise<void> {
  const { sheet, ...rest } = coating;
  await trx('coating').insert({ shop_id: shopId, ...rest, sheet: JSON.stringify(sheet) });
}

const present = ({ id, name, kind, sheet }: Row): Coating => ({
  id,
  name,
  kind: coatingKind.catch('other').parse(kind),
  sheet: upToDate(sheet),
});

/** Rows written before a line was known lack it; the first ones had a single lamp line that named its wave. */
export function upToDate({ lamp, ...stored }: Record<string, unknown>): CoatingSheet {
  const { wave, ...cure } = (lamp ?? {}) as { wave?: 'short' | 'medium' };
  const lamps = wave === undefined ? {} : { [wave === 'short' ? 'lampShort' : 'lampMedium']: cure };
  return coatingSheet.parse({ ...emptySheet, ...lamps, ...stored });
}
