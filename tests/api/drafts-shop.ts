import type { Knex } from 'knex';
import { randomUUID } from 'node:crypto';
import { inShop, type Trx } from '#server/db/in-shop.ts';
import { aMember, aShop, aWay, type TestShop } from '../helpers/factories-jobs.ts';

/** The shop of `factories-jobs.ts` with a booth that may heat, a second booth that may not, and a trained painter. */
export type PlanShop = TestShop & {
  cold: string;
  lead: string;
  other: string;
  in: <T>(work: (trx: Trx) => Promise<T>) => Promise<T>;
};

export async function aPlanShop(db: Knex): Promise<PlanShop> {
  const shop = await aShop(db);
  const inside = <T>(work: (trx: Trx) => Promise<T>): Promise<T> =>
    inShop(db, { shopId: shop.id, accountId: null }, work);
  const cold = randomUUID();
  await inside(async (trx) => {
    await trx('place')
      .where({ shop_id: shop.id, id: shop.booth })
      .update({ volume_m3: 96, air_flow_m3_per_hour: 20_000, bake_limit_celsius: 80 });
    await trx('place').insert({ shop_id: shop.id, id: cold, kind: 'booth', name: 'Cold booth', units: 4, position: 4 });
    await trx('person').where({ shop_id: shop.id, id: shop.painter }).update({ spray_trained_on: '2024-01-10' });
  });
  const lead = await aMember(db, shop, { role: 'lead' });
  const other = await aMember(db, shop, { role: 'lead' });
  return { ...shop, cold, lead, other, in: inside };
}

export const spray = aWay({
  id: 'spray',
  label: 'Spray',
  placeKinds: ['booth'],
  skill: 'paint',
  phases: [
    { kind: 'spray', minutes: 20, attendance: 'hands' },
    { kind: 'flash', minutes: 10, attendance: 'none' },
  ],
});
export const bake = aWay({
  id: 'bake',
  label: 'Booth bake',
  placeKinds: [],
  stay: true,
  skill: null,
  gap: { min: 10, max: 60, settle: 0 },
  bakeCelsius: 60,
  phases: [
    { kind: 'purge', minutes: 3, attendance: 'none' },
    { kind: 'bake', minutes: 30, attendance: 'onsite' },
  ],
});
export const air = aWay({
  id: 'air',
  label: 'Air dry',
  placeKinds: ['rack'],
  skill: null,
  gap: { min: 20, max: 240, settle: 20 },
  phases: [{ kind: 'cool', minutes: 120, attendance: 'none' }],
});
export const utc = (time: string): Date => new Date(`2026-03-${time}:00Z`);
