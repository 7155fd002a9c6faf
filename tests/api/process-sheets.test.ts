import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { SheetBody, SheetDetail } from '#contracts/sheets.ts';
import { inShop } from '#server/db/in-shop.ts';
import type { Deps } from '#server/deps.ts';
import { jobRoutes } from '#server/http/jobs.ts';
import type { Routes } from '#server/http/route.ts';
import { sheetRoutes } from '#server/http/sheets.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aMember, aSheet, aSheetBody, aShop, aWay, newJob, type TestShop } from '../helpers/factories-jobs.ts';

const routes = (to: Routes, deps: Deps): void => {
  sheetRoutes(to, deps);
  jobRoutes(to, deps);
};
let api: TestApi;
let shop: TestShop;
let other: TestShop;
let lead: string;
let painter: string;
beforeAll(async () => {
  api = await testApi(routes, '2026-03-02T08:00:00Z');
});
afterAll(() => api.close());
beforeEach(async () => {
  shop = await aShop(api.deps.db);
  other = await aShop(api.deps.db);
  lead = await aMember(api.deps.db, shop, { role: 'lead' });
  painter = await aMember(api.deps.db, shop, { role: 'painter' });
});

const at = (rest = '', of: { id: string } = shop) => `/api/shops/${of.id}/process-sheets${rest}`;
const changed = (title: string): SheetBody => {
  const body = aSheetBody();
  return { ...body, stages: body.stages.map((stage, i) => (i === 0 ? { ...stage, title } : stage)) };
};
const create = (given: object) => api.as(lead).post(at()).send(given);
const made = async (name = 'Wing', body = aSheetBody()): Promise<SheetDetail> =>
  (await create({ id: randomUUID(), name, body }).expect(200)).body;
const save = (sheet: SheetDetail, body: SheetBody, more = {}) =>
  api
    .as(lead)
    .post(at(`/${sheet.id}/versions`))
    .send({ version: sheet.version, body, ...more });
const history = () =>
  inShop(api.deps.db, { shopId: shop.id, accountId: null }, (trx) =>
    trx('change')
      .where({ shop_id: shop.id })
      .orderBy('seq')
      .select<{ kind: string; detail: object }[]>('kind', 'detail'),
  );

describe('making a sheet', () => {
  test('of a body; sent twice it is one; the same id for another sheet is refused', async () => {
    const given = { id: randomUUID(), name: ' Wing ', body: aSheetBody(), note: 'First' };
    const first = await create(given).expect(200);
    expect(first.body).toMatchObject({
      id: given.id,
      name: 'Wing',
      version: 1,
      retiredAt: null,
      body: aSheetBody(),
      versions: [{ version: 1, by: 'The lead', note: 'First', openJobs: 0, at: '2026-03-02T08:00:00.000Z' }],
    });
    const again = await create(given).expect(200);
    expect(again.body).toEqual(first.body);
    expect(await history()).toHaveLength(1);
    const { body: refused } = await create({ ...given, body: changed('Other') }).expect(409);
    expect(refused.error.code).toBe('key-reused');
  });

  test('as a copy of the newest version of another', async () => {
    const original = await made('Original');
    await save(original, changed('Clean twice')).expect(200);
    const { body } = await create({ id: randomUUID(), name: 'Copy', copyOf: original.id }).expect(200);
    expect(body).toMatchObject({ version: 1, body: changed('Clean twice') });
    const theirs = await aSheet(api.deps.db, other);
    for (const copyOf of [theirs, randomUUID()]) {
      const { body: refused } = await create({ id: randomUUID(), name: 'Stolen', copyOf }).expect(400);
      expect(refused.error.fields).toEqual([{ path: 'body.copyOf', message: 'no such process sheet' }]);
    }
  });

  test('a name is there once; what is malformed is said with its place', async () => {
    await made('Wing');
    const { body: taken } = await create({ id: randomUUID(), name: 'Wing', body: aSheetBody() }).expect(400);
    expect(taken.error.fields[0].path).toBe('body.name');
    const gap = { min: 30, max: 10, settle: 0 };
    const broken = aSheetBody({ stages: [{ ...aSheetBody().stages[0]!, ways: [aWay({ gap })] }] });
    const { body } = await create({ id: randomUUID(), name: 'Broken', body: broken }).expect(400);
    expect(body.error.fields[0].path).toBe('body.body.stages.0.ways.0.gap');
    await create({ id: randomUUID(), name: 'Neither' }).expect(400);
  });

  test('a sheet that could hurt is refused with every fault and where it lies', async () => {
    const hot = aWay({
      id: 'lamp',
      label: 'Lamp',
      skill: null,
      lampCount: 1,
      phases: [{ kind: 'bake', minutes: 20, attendance: 'onsite', lamp: true }],
    });
    const stages = [{ ...aSheetBody().stages[0]!, title: 'Cure', coatingId: randomUUID(), ways: [hot] }];
    const { body } = await create({ id: randomUUID(), name: 'Hot', body: aSheetBody({ stages }) }).expect(422);
    expect(body.error.reasons).toEqual(
      expect.arrayContaining([
        expect.objectContaining({ code: 'sheet:heat-no-temperature', ids: ['prep', 'lamp'], names: ['Cure, Lamp'] }),
        expect.objectContaining({ code: 'sheet:coating-unknown', names: ['Cure'] }),
      ]),
    );
  });
});

describe('versions', () => {
  test('a change is the next version; old ones can still be read; the same again makes none', async () => {
    const sheet = await made();
    const { body: second } = await save(sheet, changed('Clean twice'), {
      note: 'Silicone trouble',
      name: 'Wing, new',
    }).expect(200);
    expect(second).toMatchObject({
      name: 'Wing, new',
      version: 2,
      versions: [{ version: 2, note: 'Silicone trouble' }, { version: 1 }],
    });
    const { body: same } = await save(sheet, changed('Clean twice'), { name: 'Wing, new' }).expect(200);
    expect(same).toEqual(second);
    const first = await api
      .as(painter)
      .get(at(`/${sheet.id}/versions/${sheet.versionId}`))
      .expect(200);
    expect(first.body).toMatchObject({ version: 1, body: aSheetBody() });
    await api
      .as(painter)
      .get(at(`/${sheet.id}/versions/${randomUUID()}`))
      .expect(404);
    expect((await history()).map(({ kind }) => kind)).toEqual(['sheets-changed', 'sheets-changed']);
  });

  test('who is too late gets the newer version and changes nothing', async () => {
    const sheet = await made();
    await save(sheet, changed('Theirs')).expect(200);
    const { body } = await save(sheet, changed('Mine')).expect(409);
    expect(body.error).toMatchObject({ code: 'stale', current: { version: 2, body: changed('Theirs') } });
    const { body: now } = await api
      .as(lead)
      .get(at(`/${sheet.id}`))
      .expect(200);
    expect(now).toEqual(body.error.current);
  });

  test('a retried save with its key makes one version', async () => {
    const sheet = await made();
    const key = randomUUID();
    const send = () => save(sheet, changed('Once')).set('Idempotency-Key', key).expect(200);
    expect((await send()).body).toEqual((await send()).body);
    expect((await api.as(lead).get(at(`/${sheet.id}`))).body.versions).toHaveLength(2);
  });

  test('a job keeps the version it was made with, a new job gets the new one', async () => {
    const sheet = await made();
    const jobs = `/api/shops/${shop.id}/jobs`;
    const { body: old } = await api.as(lead).post(jobs).send(newJob(sheet.id)).expect(200);
    const { body: saved } = await save(sheet, changed('Clean twice')).expect(200);
    const { body: after } = await api.as(lead).get(`${jobs}/${old.id}`).expect(200);
    expect(after.stages).toEqual(old.stages);
    expect(after).toMatchObject({ sheet: { version: 1 }, stages: [{ title: 'Prepare' }, { title: 'Finish' }] });
    const { body: fresh } = await api.as(lead).post(jobs).send(newJob(sheet.id)).expect(200);
    expect(fresh).toMatchObject({ sheet: { version: 2 }, stages: [{ title: 'Clean twice' }, { title: 'Finish' }] });
    expect(saved.versions).toMatchObject([{ openJobs: 0 }, { openJobs: 1 }]);
    const { body: survey } = await api.as(painter).get(`/api/shops/${shop.id}/process-sheet-survey`).expect(200);
    expect(survey.sheets).toMatchObject([{ id: sheet.id, version: 2, openJobs: 2, retiredAt: null }]);
  });
});

describe('options of a job', () => {
  const body = () =>
    aSheetBody({
      options: [
        { key: 'wet', label: 'Wet on wet', on: false },
        { key: 'coats', label: 'Extra coats', on: false, most: 2 },
      ],
      stages: [
        { ...aSheetBody().stages[0]!, key: 'sand', title: 'Sand', unlessOption: 'wet' },
        {
          ...aSheetBody().stages[1]!,
          key: 'base',
          title: 'Base',
          ways: [
            aWay({
              skill: 'paint',
              phases: [
                { kind: 'spray', minutes: 6, attendance: 'hands' },
                { kind: 'flash', minutes: 10, attendance: 'hands', perExtraCoat: 'coats' },
                { kind: 'spray', minutes: 6, attendance: 'hands', perExtraCoat: 'coats' },
              ],
            }),
          ],
        },
      ],
    });
  const job = async (options: string[]) => {
    const sheet = await made('Options', body());
    return api.as(lead).post(`/api/shops/${shop.id}/jobs`).send(newJob(sheet.id, { options }));
  };
  test('switch off stages and add coats; what the job keeps names no option', async () => {
    const { body: one } = (await job(['wet', 'coats', 'coats'])) as {
      body: { stages: { title: string; ways: { phases: unknown[] }[] }[] };
    };
    expect(one.stages.map(({ title }) => title)).toEqual(['Base']);
    expect(one.stages[0]?.ways[0]?.phases).toHaveLength(5);
    expect(JSON.stringify(one.stages)).not.toMatch(/perExtraCoat|unlessOption/);
  });
  test('are named as often as the sheet allows', async () => {
    const { body: refused } = await job(['wet', 'coats', 'coats', 'coats', 'wet', 'glitter']);
    expect(refused.error.fields).toEqual([
      { path: 'body.options.3', message: 'can be chosen 2 times at most' },
      { path: 'body.options.4', message: 'can be chosen once' },
      { path: 'body.options.5', message: 'not an option of this process sheet' },
    ]);
  });
});

describe('renaming and retiring', () => {
  const change = (sheet: SheetDetail, fields: object) =>
    api
      .as(lead)
      .patch(at(`/${sheet.id}`))
      .send({ revision: sheet.revision, ...fields });
  test('make no version; a retired sheet makes no jobs until it is brought back', async () => {
    const sheet = await made();
    const { body: renamed } = await change(sheet, { name: 'Door' }).expect(200);
    expect(renamed).toMatchObject({ name: 'Door', version: 1, revision: 2 });
    const { body: gone } = await change(renamed, { retired: true }).expect(200);
    expect(gone.retiredAt).toBe('2026-03-02T08:00:00.000Z');
    expect((await api.as(lead).get(at())).body.sheets).toEqual([]);
    const refused = await api.as(lead).post(`/api/shops/${shop.id}/jobs`).send(newJob(sheet.id)).expect(400);
    expect(refused.body.error.fields[0].path).toBe('body.sheetId');
    const { body: back } = await change(gone, { retired: false }).expect(200);
    expect(back).toMatchObject({ retiredAt: null, revision: 4 });
    await api.as(lead).post(`/api/shops/${shop.id}/jobs`).send(newJob(sheet.id)).expect(200);
  });
  test('a stale revision is told what stands; a rename does not stand in the way of a version', async () => {
    const sheet = await made();
    await made('Taken');
    await change(sheet, { name: 'Door' }).expect(200);
    const { body: stale } = await change(sheet, { name: 'Bonnet' }).expect(409);
    expect(stale.error).toMatchObject({ code: 'stale', current: { name: 'Door', revision: 2 } });
    await save(sheet, changed('Clean twice')).expect(200);
    const { body: taken } = await change(stale.error.current, { name: 'Taken' });
    expect(taken.error.code).toBe('stale');
    const { body: now } = await api.as(lead).get(at(`/${sheet.id}`));
    await change(now, { name: 'Taken' }).expect(400);
    await change(now, { nonsense: 1 }).expect(400);
  });
});

test('what the shop has: skills, who may spray, lamps, places', async () => {
  await inShop(api.deps.db, { shopId: shop.id, accountId: null }, (trx) =>
    trx('person').where({ shop_id: shop.id, id: shop.painter }).update({ spray_trained_on: '2024-01-10' }),
  );
  const { body } = await api.as(painter).get(`/api/shops/${shop.id}/process-sheet-ground`).expect(200);
  expect(body).toMatchObject({
    skills: [
      { skill: 'paint', people: 1, trained: 1 },
      { skill: 'prep', people: 2, trained: 1 },
    ],
    lamps: 1,
  });
  expect(body.places).toHaveLength(3);
});

test('painters read, leads write; another shop answers like none', async () => {
  const sheet = await made();
  const theirs = await aSheet(api.deps.db, other);
  await api
    .as(painter)
    .get(at(`/${sheet.id}`))
    .expect(200);
  await api
    .as(painter)
    .post(at(`/${sheet.id}/versions`))
    .send({ version: 1, body: aSheetBody() })
    .expect(403);
  await api
    .as(lead)
    .get(at(`/${theirs}`))
    .expect(404);
  await api
    .as(lead)
    .post(at(`/${theirs}/versions`))
    .send({ version: 1, body: aSheetBody() })
    .expect(404);
  await api
    .as(lead)
    .get(at(`/${sheet.id}`, other))
    .expect(404);
});
