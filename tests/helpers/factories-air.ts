import { v7 as uuid } from 'uuid';
import type { Knex } from 'knex';

/** A zone of the shop, with the places in it. */
export async function aZone(
  owner: Knex,
  shop: { id: string },
  given: { name?: string; places?: string[] } = {},
): Promise<{ id: string; name: string }> {
  const zone = { id: uuid(), name: given.name ?? `Zone ${uuid().slice(-6)}` };
  await owner('zone').insert({ shop_id: shop.id, ...zone });
  await owner('place')
    .where({ shop_id: shop.id })
    .whereIn('id', given.places ?? [])
    .update({ zone_id: zone.id });
  return zone;
}

/** What a reading is as a browser or a logger sends it; the zone apart. */
export const figures = (given: Partial<Figures> = {}): Figures => ({
  id: uuid(),
  at: '2026-03-10T12:45:00Z',
  celsius: 20,
  humidity: 50,
  surfaceCelsius: null,
  ...given,
});
type Figures = { id: string; at: string; celsius: number; humidity: number; surfaceCelsius: number | null };
