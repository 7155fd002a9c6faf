import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { TouchedByCoating } from '#contracts/retiming.ts';
import type { SheetBody, Way } from '#contracts/sheets.ts';
import { inShop } from '#server/db/in-shop.ts';
import { coatingRoutes } from '#server/http/coatings.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aNewCoating, clear } from '../helpers/coatings.ts';
import { aBooking, aJob, aMember, aSheet, aSheetBody, aShop, aWay, type TestShop } from '../helpers/factories-jobs.ts';

let api: TestApi;
let shop: TestShop;
let lead: string;
let painter: string;
beforeAll(async () => {
  api = await testApi(coatingRoutes, '2026-03-02T08:00:00Z');
});
afterAll(() => api.close());
beforeEach(async () => {
  shop = await aShop(api.deps.db);
  lead = await aMember(api.deps.db, shop, { role: 'lead' });
  painter = await aMember(api.deps.db, shop, { role: 'painter' });
});

const at = (path = '') => `/api/shops/${shop.id}/coatings${path}`;
const put = (coating = aNewCoating()) => api.as(lead).post(at()).send(coating).expect(200);

describe('what a data sheet touches', () => {
  const spray = aWay({
    id: 'spray',
    label: 'Sprayed',
    placeKinds: ['booth'],
    skill: 'paint',
    phases: [
      { kind: 'spray', minutes: 8, attendance: 'hands', source: 'coat' },
      { kind: 'flash', minutes: 10, attendance: 'hands', source: 'flash-between' },
      { kind: 'spray', minutes: 8, attendance: 'hands', source: 'coat' },
    ],
  });
  const bake = aWay({
    id: 'booth-bake',
    label: 'Booth bake',
    placeKinds: [],
    stay: true,
    skill: null,
    bakeCelsius: 60,
    gap: { min: 12, max: 60, settle: 12, source: 'heat' },
    phases: [{ kind: 'bake', minutes: 40, attendance: 'onsite', source: 'bake' }],
  });
  const stagesOf = (coatingId: string): SheetBody['stages'] => [
    { key: 'prep', kind: 'prep', title: 'Prepare', option: null, coatingId: null, ways: [aWay()] },
    { key: 'clear', kind: 'clear', title: 'Clear', option: null, coatingId, ways: [spray] },
    { key: 'bake', kind: 'cure', title: 'Bake', option: null, coatingId, ways: [bake] },
  ];
  const slower = {
    ...clear,
    flashBetweenCoats: 15,
    flashBeforeHeat: 20,
    bake: { minutes: 40, celsius: 65, measuredAt: 'metal' as const },
  };

  async function ground() {
    const { id } = (await put()).body;
    const sheetId = await aSheet(api.deps.db, shop, aSheetBody({ stages: stagesOf(id) }), 'With clear');
    await aSheet(api.deps.db, shop, aSheetBody(), 'Without');
    const stages = stagesOf(id).map(({ kind, title, ways, coatingId }) => ({ kind, title, ways, coatingId }));
    const [waiting, begun, done] = [
      await aJob(api.deps.db, shop, { stages }),
      await aJob(api.deps.db, shop, { stages }),
      await aJob(api.deps.db, shop, { stages }),
    ];
    await inShop(api.deps.db, { shopId: shop.id, accountId: null }, async (trx) => {
      const [prep, sprayed] = begun.stages;
      const over = {
        state: 'done',
        started_at: new Date('2026-03-02T07:00Z'),
        finished_at: new Date('2026-03-02T07:30Z'),
      };
      await trx('stage')
        .where({ shop_id: shop.id })
        .whereIn('id', [prep ?? '', sprayed ?? ''])
        .update(over);
      await trx('job').where({ shop_id: shop.id, id: done.id }).update({ state: 'done' });
    });
    return { id, sheetId, waiting, begun };
  }
  const touchedBy = async (id: string): Promise<TouchedByCoating> => {
    const { body } = await api
      .as(painter)
      .get(at(`/${id}/touched`))
      .expect(200);
    return body as TouchedByCoating;
  };
  const retime = (id: string, body: object) =>
    api
      .as(lead)
      .post(at(`/${id}/retime`))
      .send(body);

  test('is every sheet and open job that names it; nothing differs until the sheet does', async () => {
    const { id, sheetId, waiting, begun } = await ground();
    const before = await touchedBy(id);
    expect(before.sheets).toMatchObject([{ id: sheetId, name: 'With clear', version: 1, differs: false }]);
    expect(before.jobs.map((job) => [job.id, job.differs])).toEqual([
      [waiting.id, false],
      [begun.id, false],
    ]);
    // What has begun is left out.
    expect(before.jobs[1]?.stages.map(({ title }) => title)).toEqual(['Bake']);
    expect((await api.as(lead).get(at(`/${id}`))).body.usedBy).toEqual([{ id: sheetId, name: 'With clear' }]);

    await api
      .as(lead)
      .patch(at(`/${id}`))
      .send({ version: 1, sheet: slower })
      .expect(200);
    const after = await touchedBy(id);
    expect(after.sheets[0]?.stages).toEqual([
      {
        title: 'Clear',
        booked: false,
        ways: [{ label: 'Sprayed', minutes: { from: 26, to: 31 }, earliest: null, latest: null, bakeCelsius: null }],
      },
      {
        title: 'Bake',
        booked: false,
        // 40 min of hot metal and 10 to get there.
        ways: [
          {
            label: 'Booth bake',
            minutes: { from: 40, to: 50 },
            earliest: { from: 12, to: 20 },
            latest: null,
            bakeCelsius: { from: 60, to: 65 },
          },
        ],
      },
    ]);
  });

  test('is re-timed only where told to: a new version of the sheet, the waiting stages of the job', async () => {
    const { id, sheetId, waiting, begun } = await ground();
    const [, sprayed] = waiting.stages;
    await aBooking(api.deps.db, shop, { stage: sprayed ?? '', place: shop.booth, from: new Date('2026-03-03T09:00Z') });
    await api
      .as(lead)
      .patch(at(`/${id}`))
      .send({ version: 1, sheet: slower })
      .expect(200);
    await retime(id, { version: 1, sheetIds: [sheetId], jobIds: [] }).expect(409);
    const chosen = { version: 2, sheetIds: [sheetId], jobIds: [waiting.id] };
    const { body } = await retime(id, chosen).expect(200);
    expect(body).toMatchObject({ sheets: 1, jobs: 1, bookedStages: 1 });
    expect(body.touched.sheets[0]).toMatchObject({ version: 2, differs: false });
    expect((body.touched as TouchedByCoating).jobs.map(({ differs }) => differs)).toEqual([false, true]);
    // Once more does nothing more.
    expect((await retime(id, chosen).expect(200)).body).toMatchObject({ sheets: 0, jobs: 0, bookedStages: 0 });

    const rows = await inShop(api.deps.db, { shopId: shop.id, accountId: null }, async (trx) => ({
      versions: await trx('process_sheet_version')
        .where({ shop_id: shop.id, process_sheet_id: sheetId })
        .orderBy('version'),
      stages: await trx('stage').where({ shop_id: shop.id }).whereIn('job_id', [waiting.id, begun.id]),
      changes: await trx('change').where({ shop_id: shop.id }).orderBy('seq').select('kind', 'ids'),
    }));
    expect(rows.versions.map(({ version, created_by: by }) => [version, by])).toEqual([
      [1, null],
      [2, lead],
    ]);
    const minutes = (jobId: string) =>
      rows.stages
        .filter((stage) => stage.job_id === jobId)
        .toSorted((a, b) => a.position - b.position)
        .map((stage) => [stage.version, (stage.ways as Way[])[0]?.phases.map(({ minutes: one }) => one)]);
    expect(minutes(waiting.id)).toEqual([
      [1, [60]],
      [2, [8, 15, 8]],
      [2, [50]],
    ]);
    expect(minutes(begun.id)).toEqual([
      [1, [60]],
      [1, [8, 10, 8]],
      [1, [40]],
    ]);
    expect(rows.changes.slice(-2)).toEqual([
      { kind: 'sheets-changed', ids: [sheetId] },
      { kind: 'job-changed', ids: [waiting.id] },
    ]);
  });

  test('is all or nothing: one that does not name it, and nothing is written', async () => {
    const { id, sheetId, waiting } = await ground();
    await api
      .as(lead)
      .patch(at(`/${id}`))
      .send({ version: 1, sheet: slower })
      .expect(200);
    await retime(id, { version: 2, sheetIds: [sheetId], jobIds: [waiting.id, randomUUID()] }).expect(404);
    expect((await touchedBy(id)).sheets[0]).toMatchObject({ version: 1, differs: true });
    await retime(id, { version: 2, sheetIds: [], jobIds: [] }).expect(400);
    await api
      .as(painter)
      .post(at(`/${id}/retime`))
      .send({ version: 2, sheetIds: [sheetId], jobIds: [] })
      .expect(403);
  });
});
