import type { Cleanup, Objective } from '#contracts/shop-settings.ts';
import type { Trx } from './in-shop.ts';

export type NewShop = {
  id: string;
  name: string;
  timeZone: string;
  lampMoveMinutes: number;
  freezeMinutes: number;
  cleanups: readonly Cleanup[];
  objective: Objective;
};

/** False where the id is taken. Needs a transaction in that shop. */
export async function insertShop(trx: Trx, shop: NewShop): Promise<boolean> {
  const made = await trx('shop')
    .insert({
      id: shop.id,
      name: shop.name,
      time_zone: shop.timeZone,
      lamp_move_minutes: shop.lampMoveMinutes,
      freeze_minutes: shop.freezeMinutes,
      cleanups: JSON.stringify(shop.cleanups),
      objective: JSON.stringify(shop.objective),
    })
    .onConflict('id')
    .ignore()
    .returning('id');
  return made.length === 1;
}
