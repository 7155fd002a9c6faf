import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { draftRoutes } from '#server/http/drafts.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aMember, aShop } from '../helpers/factories-jobs.ts';
import { aPlanShop, bonnet, draftDesk, utc, type PlanShop } from './drafts-shop.ts';

let api: TestApi;
let shop: PlanShop;
let desk: ReturnType<typeof draftDesk>;
beforeAll(async () => {
  api = await testApi(draftRoutes, '2026-03-02T06:30:00Z');
});
afterAll(() => api.close());
beforeEach(async () => {
  shop = await aPlanShop(api.deps.db);
  desk = draftDesk(api, shop);
});

describe('opening', () => {
  it('copies the posted plan, and is the same draft for everybody', async () => {
    const job = await bonnet(api.deps.db, shop);
    const [one, two] = await Promise.all([desk.open(), desk.open(shop.other)]);
    expect(two).toEqual(one);
    expect((await desk.items()).map(({ stage_id }) => stage_id)).toEqual([job.clear, job.bake]);
    expect(await desk.changes()).toEqual(['draft-opened']);
  });

  it('is for leads and owners; who does not belong to the shop learns nothing', async () => {
    const painter = await aMember(api.deps.db, shop, { role: 'painter' });
    await api.as(painter).post(desk.url()).send({}).expect(403);
    const elsewhere = await aMember(api.deps.db, await aShop(api.deps.db), { role: 'owner' });
    await api.as(elsewhere).post(desk.url()).send({}).expect(404);
  });
});

describe('comparing and dropping', () => {
  it('tells what moves, whose promise turns late and who hears of it', async () => {
    const job = await bonnet(api.deps.db, shop);
    await aMember(api.deps.db, shop, { role: 'painter', personId: shop.painter });
    await shop.in((trx) =>
      trx('job')
        .where({ shop_id: shop.id, id: job.id })
        .update({ promise_at: utc('02T10:00') }),
    );
    const draft = await desk.open();
    await desk.move(job.clear, { version: draft.version, start: utc('02T09:00'), placeId: shop.booth }).expect(200);
    const { body } = await api.as(shop.lead).get(desk.url('/compare')).expect(200);
    expect(body.moved).toHaveLength(2);
    expect(body.moved[0]).toMatchObject({
      stageTitle: 'Clear',
      before: { from: '2026-03-02T08:00:00.000Z', personName: 'Painter' },
      after: { from: '2026-03-02T09:00:00.000Z' },
    });
    expect(body).toMatchObject({
      newlyLate: [{ jobId: job.id, endsAt: '2026-03-02T10:18:00.000Z' }],
      saved: [],
      told: ['Painter'],
      reasons: [],
    });
  });

  it('drops the draft in the version seen, and once is enough', async () => {
    await bonnet(api.deps.db, shop);
    const draft = await desk.open();
    await api.as(shop.lead).post(desk.url('/drop')).send({ version: 7 }).expect(409);
    await api.as(shop.lead).post(desk.url('/drop')).send({ version: draft.version }).expect(204);
    await api.as(shop.lead).post(desk.url('/drop')).send({ version: draft.version }).expect(204);
    await api.as(shop.lead).get(desk.url('/compare')).expect(404);
    expect((await desk.open()).id).not.toBe(draft.id);
  });
});
