import { coatingKind, type Coating } from '#contracts/coatings.ts';
import { upToDate } from './coatings.ts';
import type { Trx } from './in-shop.ts';

/** Retired ones too: a process sheet may still name them. */
export async function everyCoating(trx: Trx, shopId: string): Promise<Coating[]> {
  const rows = await trx('coating')
    .where({ shop_id: shopId })
    .orderBy('name')
    .select<{ id: string; name: string; kind: string; sheet: Record<string, unknown> }[]>(
      'id',
      'name',
      'kind',
      'sheet',
    );
  return rows.map(({ id, name, kind, sheet }) => ({
    id,
    name,
    kind: coatingKind.catch('other').parse(kind),
    sheet: upToDate(sheet),
  }));
}
