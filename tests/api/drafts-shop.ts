import type { Knex } from 'knex';
import { randomUUID } from 'node:crypto';
import type { MoveResult } from '#server/services/move-stage.ts';
import type { Way } from '#contracts/sheets.ts';
import type { Reason } from '#contracts/reasons.ts';
import { inShop, type Trx } from '#server/db/in-shop.ts';
import type { TestApi } from '../helpers/api-as.ts';
import { aBooking, aJob, aMember, aShop, aWay, type TestShop } from '../helpers/factories-jobs.ts';

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

/** Sprayed from 08:00 (UTC) and baked on the spot a quarter of an hour after, posted. */
export async function bonnet(db: Knex, shop: PlanShop, given: { title?: string; from?: Date; ways?: Way[] } = {}) {
  const stages = [
    { title: 'Clear', ways: [spray] },
    { title: 'Bake', ways: given.ways ?? [bake, air] },
  ];
  const job = await aJob(db, shop, { title: given.title ?? 'Bonnet', stages });
  const [clear = '', baked = ''] = job.stages;
  const from = given.from ?? utc('02T08:00');
  const painted = { stage: clear, place: shop.booth, person: shop.painter, way: 'spray', phases: [20, 10] };
  await aBooking(db, shop, { ...painted, from });
  const after = new Date(from.getTime() + 45 * 60_000);
  await aBooking(db, shop, { stage: baked, place: shop.booth, from: after, way: 'bake', phases: [3, 30] });
  return { ...job, clear, bake: baked };
}

/** Requests about a shop's draft, and what its rows say. */
export const draftDesk = (api: TestApi, shop: PlanShop) => {
  const url = (path = ''): string => `/api/shops/${shop.id}/draft${path}`;
  return {
    url,
    open: async (account = shop.lead) =>
      (await api.as(account).post(url()).send({}).expect(200)).body as { id: string; version: number },
    move: (stage: string, body: object, account = shop.lead) =>
      api
        .as(account)
        .post(url(`/stages/${stage}/move`))
        .send(body),
    rows: (table: string): Promise<Row[]> =>
      shop.in((trx) => trx(table).where({ shop_id: shop.id }).select<Row[]>('*')),
    items: (): Promise<Row[]> =>
      shop.in((trx) => trx('draft_item').where({ shop_id: shop.id }).orderByRaw('lower(during)').select<Row[]>('*')),
    changes: (): Promise<string[]> =>
      shop.in((trx) => trx('change').where({ shop_id: shop.id }).orderBy('seq').pluck('kind')) as Promise<string[]>,
  };
};
export type Row = Record<string, unknown>;

type Answer = { body: unknown };
export const reasonsOf = (answer: Answer): Reason[] => (answer.body as { error: { reasons: Reason[] } }).error.reasons;
export const codesOf = (answer: Answer): string[] => reasonsOf(answer).map(({ code }) => code);
export const movedOf = (answer: Answer): MoveResult => answer.body as MoveResult;
