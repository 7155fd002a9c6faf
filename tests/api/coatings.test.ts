import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { emptySheet, type Coating, type CoatingSheet } from '#contracts/coatings.ts';
import type { SheetBody } from '#contracts/sheets.ts';
import { insertCoating } from '#server/db/coatings.ts';
import { inShop } from '#server/db/in-shop.ts';
import { coatingRoutes } from '#server/http/coatings.ts';
import { sheetRoutes } from '#server/http/sheets.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aBooking, aJob, aMember, aSheet, aSheetBody, aShop, aWay, type TestShop } from '../helpers/factories-jobs.ts';

let api: TestApi;
let shop: TestShop;
let lead: string;
let painter: string;
beforeAll(async () => {
  api = await testApi((routes, deps) => {
    coatingRoutes(routes, deps);
    sheetRoutes(routes, deps);
  }, '2026-03-02T08:00:00Z');
});
afterAll(() => api.close());
beforeEach(async () => {
  shop = await aShop(api.deps.db);
  lead = await aMember(api.deps.db, shop, { role: 'lead' });
  painter = await aMember(api.deps.db, shop, { role: 'painter' });
});

const clear: CoatingSheet = {
  ...emptySheet,
  coats: { from: 2, to: 2 },
  flashBetweenCoats: 10,
  flashBeforeHeat: 12,
  recoatWithin: 1440,
  potLife: 120,
  airDry: { minutes: 720, celsius: 20 },
  bake: { minutes: 30, celsius: 60, measuredAt: 'metal' },
  cautions: ['Holds isocyanate, so: air-fed.'],
};
const aCoating = (given: Partial<Coating> = {}): Coating => ({
  id: randomUUID(),
  name: 'Medium-solid clear',
  kind: 'clear',
  sheet: clear,
  ...given,
});
const at = (path = '') => `/api/shops/${shop.id}/coatings${path}`;
const put = (coating = aCoating()) => api.as(lead).post(at()).send(coating).expect(200);
const names = async (retired = 'no') =>
  (await api.as(lead).get(`/api/shops/${shop.id}/coating-survey?retired=${retired}`).expect(200)).body.coatings.map(
    ({ name }: Coating) => name,
  );

describe('a data sheet', () => {
  test('is made once however often it is sent, read by everybody, kept by leads and owners', async () => {
    const coating = aCoating();
    const made = await put(coating);
    expect(made.body).toEqual({ ...coating, version: 1, retiredAt: null, document: null, usedBy: [] });
    expect((await put(coating)).body).toEqual(made.body);
    await api
      .as(lead)
      .post(at())
      .send({ ...coating, kind: 'primer' })
      .expect(409);
    expect(
      (
        await api
          .as(painter)
          .get(at(`/${coating.id}`))
          .expect(200)
      ).body,
    ).toEqual(made.body);
    await api
      .as(painter)
      .post(at())
      .send(aCoating({ name: 'Mine' }))
      .expect(403);
    await api
      .as(painter)
      .patch(at(`/${coating.id}`))
      .send({ version: 1, name: 'Mine' })
      .expect(403);
    expect(await names()).toEqual([coating.name]);
  });

  test('sent five times with one key, two at once, is one', async () => {
    const coating = aCoating();
    const send = () => api.as(lead).post(at()).set('Idempotency-Key', 'one-sheet-1').send(coating).expect(200);
    const answers = [...(await Promise.all([send(), send()])), await send(), await send(), await send()];
    for (const { body } of answers) expect(body).toEqual(answers[0]?.body);
    expect(await names()).toHaveLength(1);
  });

  test('is changed with its version; who has an old one is told how it stands', async () => {
    const { id, name } = (await put()).body;
    const sheet = { ...clear, flashBetweenCoats: 12 };
    const changed = await api
      .as(lead)
      .patch(at(`/${id}`))
      .send({ version: 1, sheet })
      .expect(200);
    expect(changed.body).toMatchObject({ version: 2, name, sheet });
    // The same once more changes nothing, whatever the version.
    expect(
      (
        await api
          .as(lead)
          .patch(at(`/${id}`))
          .send({ version: 1, sheet })
          .expect(200)
      ).body.version,
    ).toBe(2);
    const stale = await api
      .as(lead)
      .patch(at(`/${id}`))
      .send({ version: 1, name: 'Other' })
      .expect(409);
    expect(stale.body.error).toMatchObject({ code: 'stale', current: changed.body });
    const history = await inShop(api.deps.db, { shopId: shop.id, accountId: null }, (trx) =>
      trx('change').where({ shop_id: shop.id, kind: 'sheets-changed' }).orderBy('seq').select('detail'),
    );
    expect(history.map(({ detail }) => detail.coating)).toEqual(['made', 'changed']);
    expect(history[1].detail.before.sheet.flashBetweenCoats).toBe(10);
  });

  test('is taken out of use and brought back, and keeps its name meanwhile', async () => {
    const { id, name } = (await put()).body;
    const retired = await api
      .as(lead)
      .patch(at(`/${id}`))
      .send({ version: 1, retired: true })
      .expect(200);
    expect(retired.body.retiredAt).toBe('2026-03-02T08:00:00.000Z');
    expect([await names(), await names('yes')]).toEqual([[], [name]]);
    expect((await api.as(lead).get(at()).expect(200)).body.coatings).toEqual([]);
    const taken = await api
      .as(lead)
      .post(at())
      .send(aCoating({ name: name.toUpperCase() }))
      .expect(400);
    expect(taken.body.error.fields).toEqual([{ path: 'body.name', message: 'another data sheet has this name' }]);
    await api
      .as(lead)
      .patch(at(`/${id}`))
      .send({ version: 2, retired: false })
      .expect(200);
    expect(await names()).toEqual([name]);
  });

  test.each<[string, object, string]>([
    ['fewer coats at most than at least', { coats: { from: 3, to: 2 } }, 'body.sheet.coats'],
    ['a window that ends before it begins', { flashBeforeNext: 20, recoatWithin: 10 }, 'body.sheet.recoatWithin'],
    ['a bake above the own limit', { heatLimitCelsius: 55 }, 'body.sheet.bake'],
    ['a turned range', { holds: { from: 30, to: 15 } }, 'body.sheet.holds'],
    ['a time that is none', { flashBetweenCoats: -1 }, 'body.sheet.flashBetweenCoats'],
    ['half a line', { airDry: { minutes: 10 } }, 'body.sheet.airDry.celsius'],
    ['what no sheet has', { colour: 'red' }, 'body.sheet'],
  ])('is refused for %s', async (_, given, path) => {
    const answer = await api
      .as(lead)
      .post(at())
      .send({ ...aCoating(), sheet: { ...clear, ...given } })
      .expect(400);
    expect(answer.body.error.fields.map((field: { path: string }) => field.path)).toContain(path);
    expect(await names()).toEqual([]);
  });

  test('of another shop is the same as one that does not exist', async () => {
    const other = await aShop(api.deps.db);
    const theirs = aCoating();
    await inShop(api.deps.db, { shopId: other.id, accountId: null }, (trx) => insertCoating(trx, other.id, theirs));
    for (const id of [theirs.id, randomUUID()]) {
      await api
        .as(lead)
        .get(at(`/${id}`))
        .expect(404);
      await api
        .as(lead)
        .get(at(`/${id}/touched`))
        .expect(404);
      await api
        .as(lead)
        .patch(at(`/${id}`))
        .send({ version: 1, name: 'Mine' })
        .expect(404);
      await api
        .as(lead)
        .post(at(`/${id}/retime`))
        .send({ version: 1, sheetIds: [randomUUID()], jobIds: [] })
        .expect(404);
    }
  });

  test('stored before lamps had a line each is read with both', async () => {
    const id = randomUUID();
    const { lampShort: _, lampMedium: _m, maker: _n, ...old } = clear;
    await inShop(api.deps.db, { shopId: shop.id, accountId: null }, (trx) =>
      trx('coating').insert({
        shop_id: shop.id,
        id,
        name: 'Old',
        kind: 'topcoat',
        sheet: JSON.stringify({ ...old, lamp: { minutes: 25, wave: 'medium', metres: 0.8 } }),
      }),
    );
    const { body } = await api
      .as(lead)
      .get(at(`/${id}`))
      .expect(200);
    expect(body).toMatchObject({ kind: 'other', sheet: { ...clear, lampMedium: { minutes: 25, metres: 0.8 } } });
  });
});

describe('as CSV', () => {
  const importIt = (csv: string, tryOnly = false) =>
    api.as(lead).post(`/api/shops/${shop.id}/coating-imports`).send({ csv, tryOnly }).expect(200);
  const exported = async (): Promise<string> =>
    (await api.as(painter).get(`/api/shops/${shop.id}/coatings-csv`).expect(200)).body.csv;

  test('goes out and comes in again without a change, into another shop whole', async () => {
    const primer = aCoating({
      name: '=Primer, "grey"',
      kind: 'primer',
      sheet: {
        ...clear,
        maker: 'Can of the shelf',
        lampShort: { minutes: 20, metres: 0.75 },
        holds: { from: 15, to: 30 },
        coldAir: { belowCelsius: 18, factor: 1.25 },
        bake: { minutes: 30, celsius: 60, measuredAt: 'air', heatUp: 5 },
        cautions: ['First, second.', 'Third'],
      },
    });
    await put(aCoating());
    await put(primer);
    const csv = await exported();
    expect((await importIt(csv)).body).toEqual({ lines: 2, added: 0, changed: 0, faults: [] });
    shop = await aShop(api.deps.db);
    lead = await aMember(api.deps.db, shop, { role: 'lead' });
    painter = lead;
    expect((await importIt(csv, true)).body).toMatchObject({ added: 2 });
    expect(await names()).toEqual([]);
    expect((await importIt(csv)).body).toMatchObject({ added: 2, faults: [] });
    expect(await exported()).toBe(csv);
  });

  test('changes what the file speaks of: an empty cell takes a figure off, a missing column leaves it', async () => {
    const { id } = (await put()).body;
    const csv = 'name;kind;flash between coats;air minutes;air celsius\r\nMEDIUM-SOLID CLEAR;clear;12;;\r\n';
    expect((await importIt(csv)).body).toEqual({ lines: 1, added: 0, changed: 1, faults: [] });
    const { body } = await api
      .as(lead)
      .get(at(`/${id}`))
      .expect(200);
    expect(body.sheet).toEqual({ ...clear, flashBetweenCoats: 12, airDry: null });
  });

  test('is taken whole or not at all, with every fault at its line and column', async () => {
    await put(aCoating({ name: 'Kept' }));
    const rows = [
      'name,kind,coats from,coats to,flash between coats,bake minutes,bake celsius,bake measured at',
      'Fine,clear,1,2,10,,,',
      'Odd kind,lacquer,1,2,10,,,',
      'Half a bake,clear,1,2,10,30,,metal',
      'Turned,clear,3,2,10,,,',
      'No flash,clear,1,2,,,,',
      'Fine,clear,1,2,10,,,',
    ];
    const { body } = await importIt(rows.join('\n'));
    expect(body).toMatchObject({ lines: 6, added: 0, changed: 0 });
    expect(body.faults.map(({ line, column }: { line: number; column: string }) => [line, column])).toEqual([
      [3, 'kind'],
      [4, 'bake celsius'],
      [5, null],
      [6, 'flash between coats'],
      [7, 'name'],
    ]);
    expect(await names()).toEqual(['Kept']);
  });
});

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
    bake: { ...bakeLine, minutes: 40, celsius: 65 },
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
  const touchedBy = async (id: string) =>
    (
      await api
        .as(painter)
        .get(at(`/${id}/touched`))
        .expect(200)
    ).body;
  const retime = (id: string, body: object) =>
    api
      .as(lead)
      .post(at(`/${id}/retime`))
      .send(body);

  test('is every sheet and open job that names it; nothing differs until the sheet does', async () => {
    const { id, sheetId, waiting, begun } = await ground();
    const before = await touchedBy(id);
    expect(before.sheets).toMatchObject([{ id: sheetId, name: 'With clear', version: 1, differs: false }]);
    expect(before.jobs.map((job: { id: string; differs: boolean }) => [job.id, job.differs])).toEqual([
      [waiting.id, false],
      [begun.id, false],
    ]);
    // What has begun is left out.
    expect(before.jobs[1].stages.map(({ title }: { title: string }) => title)).toEqual(['Bake']);
    expect((await api.as(lead).get(at(`/${id}`))).body.usedBy).toEqual([{ id: sheetId, name: 'With clear' }]);

    await api
      .as(lead)
      .patch(at(`/${id}`))
      .send({ version: 1, sheet: slower })
      .expect(200);
    const after = await touchedBy(id);
    expect(after.sheets[0].stages).toEqual([
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
    expect(body.touched.jobs.map(({ differs }: { differs: boolean }) => differs)).toEqual([false, true]);
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
        .map((stage) => [stage.version, stage.ways[0].phases.map((phase: { minutes: number }) => phase.minutes)]);
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
const bakeLine = { minutes: 30, celsius: 60, measuredAt: 'metal' as const };
