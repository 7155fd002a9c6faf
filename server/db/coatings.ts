import type { Coating } from '#contracts/sheets.ts';
import type { Trx } from './in-shop.ts';

/** The shop's coatings with what their data sheets say, by name. */
export const listCoatings = (trx: Trx, shopId: string): Promise<Coating[]> =>
  trx('coating')
    .where({ shop_id: shopId })
    .whereNull('retired_at')
    .orderBy('name')
    .select<Coating[]>('id', 'name', 'kind', 'sheet');

export async function insertCoating(trx: Trx, shopId: string, coating: Coating): Promise<void> {
  const { sheet, ...rest } = coating;
  await trx('coating').insert({ shop_id: shopId, ...rest, sheet: JSON.stringify(sheet) });
}
