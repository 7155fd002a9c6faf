import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, expect, test } from 'vitest';
import type { PlaceUse } from '#contracts/use.ts';
import { inShop } from '#server/db/in-shop.ts';
import { benchRoutes } from '#server/http/bench.ts';
import { useRoutes } from '#server/http/use.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aBooking, aJob, aMember, aShop, aWay } from '../helpers/factories-jobs.ts';

let api: TestApi;
beforeAll(async () => {
  api = await testApi((routes, deps) => {
    useRoutes(routes, deps);
    benchRoutes(routes, deps);
  }, '2026-03-02T08:00:00Z');
});
afterAll(() => api.close());

const utc = (time: string): Date => new Date(`2026-03-${time}:00Z`);
const paint = aWay({
  id: 'paint',
  phases: [
    { kind: 'setup', minutes: 10, attendance: 'hands' },
    { kind: 'spray', minutes: 20, attendance: 'hands' },
    { kind: 'flash', minutes: 30, attendance: 'none' },
  ],
});
const bake = aWay({
  id: 'bake',
  stay: true,
  skill: null,
  gap: { min: 15, max: 60, settle: 15 },
  phases: [{ kind: 'bake', minutes: 40, attendance: 'onsite' }],
});

test('a hand-made day in one booth: hours by phase from what happened, and from the plan where nothing did', async () => {
  const { db } = api.deps;
  const shop = await aShop(db);
  const owner = await aMember(db, shop, { role: 'owner' });
  const inIt = { shopId: shop.id, accountId: null };
  // Booth closed for its filters 07:00 to 07:30 local, that is 06:00 to 06:30 UTC.
  await inShop(db, inIt, (trx) =>
    trx('closure').insert({
      shop_id: shop.id,
      id: randomUUID(),
      kind: 'maintenance',
      label: 'Filters',
      place_id: shop.booth,
      starts_local: '2026-03-02T07:00',
      rule: 'FREQ=WEEKLY',
      minutes: 30,
    }),
  );
  const load = randomUUID();
  // Two doors in one run at 08:00 UTC, then baked where they stand from 09:15 (15 minutes held).
  const bakes = randomUUID();
  for (const title of ['Door', 'Wing']) {
    const job = await aJob(db, shop, { title, stages: [{ ways: [paint] }, { ways: [bake] }] });
    const [first = '', second = ''] = job.stages;
    const place = shop.booth;
    await aBooking(db, shop, {
      stage: first,
      place,
      person: shop.painter,
      way: 'paint',
      load,
      from: utc('02T08:00'),
      phases: [10, 20, 30],
    });
    await aBooking(db, shop, { stage: second, place, way: 'bake', load: bakes, from: utc('02T09:15'), phases: [40] });
  }
  const read = async (): Promise<PlaceUse[]> =>
    (await api.as(owner).get(`/api/shops/${shop.id}/use?from=2026-03-01T23:00:00Z&to=2026-03-02T23:00:00Z`).expect(200))
      .body.places as PlaceUse[];
  const planned = await read();
  expect(planned.map((place) => [place.name, place.kind])).toEqual([
    ['Booth', 'booth'],
    ['Prep', 'prep'],
    ['Rack', 'rack'],
  ]);
  const booth = planned[0]!;
  expect(booth.hours.setup).toBeCloseTo(10 / 60, 9);
  expect(booth.hours.spray).toBeCloseTo(20 / 60, 9);
  expect(booth.hours.flash).toBeCloseTo(30 / 60, 9);
  expect(booth.hours.bake).toBeCloseTo(40 / 60, 9);
  expect(booth.hours.held).toBeCloseTo(15 / 60, 9);
  // open 07:00 to 18:00 local = 11 h, less half an hour of filters
  expect(booth.openHours).toBeCloseTo(10.5, 9);
  expect(booth.busyOpenHours).toBeCloseTo(100 / 60, 9); // 10 + 20 + 30 + 40
  expect(booth).toMatchObject({ bookings: 4, recorded: 0 });
  expect(planned[1]).toMatchObject({ bookings: 0, openHours: 11, busyOpenHours: 0 });

  // The run is recorded: begun 08:10, done 09:30. The flash takes up the 10 minutes it ran over.
  const stages = await inShop(db, inIt, (trx) =>
    trx('booking').where({ shop_id: shop.id, load_id: load }).select<{ stage_id: string }[]>('stage_id'),
  );
  const stage = stages[0]!.stage_id;
  api.setClock('2026-03-02T08:10:00Z');
  await api.as(owner).post(`/api/shops/${shop.id}/stages/${stage}/start`).send({ version: 1 }).expect(200);
  api.setClock('2026-03-02T09:30:00Z');
  await api.as(owner).post(`/api/shops/${shop.id}/stages/${stage}/finish`).send({ version: 2 }).expect(200);
  const recorded = (await read())[0]!;
  // flash 08:40 to 09:30 = 50, of which the bake planned for 09:15 takes the last 15
  expect(recorded.hours.flash).toBeCloseTo(35 / 60, 9);
  expect(recorded.hours.bake).toBeCloseTo(40 / 60, 9);
  expect(recorded.hours.held).toBeCloseTo(0, 9);
  expect(recorded).toMatchObject({ bookings: 4, recorded: 2 });
});

test('is for owners and leads, of one shop, for a range that is one', async () => {
  const { db } = api.deps;
  const shop = await aShop(db);
  const owner = await aMember(db, shop, { role: 'owner' });
  const painter = await aMember(db, shop, { role: 'painter' });
  const range = 'from=2026-03-01T23:00:00Z&to=2026-03-02T23:00:00Z';
  await api.as(painter).get(`/api/shops/${shop.id}/use?${range}`).expect(403);
  await api
    .as(owner)
    .get(`/api/shops/${(await aShop(db)).id}/use?${range}`)
    .expect(404);
  const turned = await api
    .as(owner)
    .get(`/api/shops/${shop.id}/use?from=2026-03-02T00:00:00Z&to=2026-03-01T00:00:00Z`)
    .expect(400);
  expect(turned.body.error.fields[0]).toEqual({ path: 'query.to', message: 'ends before it begins' });
  await api.as(owner).get(`/api/shops/${shop.id}/use?from=2020-01-01T00:00:00Z&to=2026-03-01T00:00:00Z`).expect(400);
});
