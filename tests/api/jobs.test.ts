import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { Job, JobRow, NewJob } from '#contracts/jobs.ts';
import { inShop } from '#server/db/in-shop.ts';
import { benchRoutes } from '#server/http/bench.ts';
import { jobRoutes } from '#server/http/jobs.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import {
  aBooking,
  aJob,
  aMember,
  aSheet,
  aSheetBody,
  aShop,
  aWay,
  newJob,
  type TestShop,
} from '../helpers/factories-jobs.ts';

let api: TestApi;
let shop: TestShop;
let office: string;
let base: string;

const now = '2026-03-02T08:00:00.000Z';
beforeAll(async () => {
  api = await testApi((routes, deps) => {
    jobRoutes(routes, deps);
    benchRoutes(routes, deps);
  }, now);
});
afterAll(() => api.close());
beforeEach(async () => {
  api.setClock(now);
  shop = await aShop(api.deps.db);
  office = await aMember(api.deps.db, shop, { role: 'office' });
  base = `/api/shops/${shop.id}/jobs`;
});

const optional = aSheetBody({
  options: [{ key: 'polish', label: 'Polish', on: true }],
  stages: [
    { key: 'prep', kind: 'prep', title: 'Prepare', option: null, coatingId: null, ways: [aWay()] },
    { key: 'polish', kind: 'polish', title: 'Polish', option: 'polish', coatingId: null, ways: [aWay()] },
  ],
});
const create = async (job: NewJob, status = 200): Promise<Job> =>
  (await api.as(office).post(base).send(job).expect(status)).body as Job;
const list = async (query = ''): Promise<{ rows: JobRow[]; total: number }> =>
  (await api.as(office).get(`${base}${query}`).expect(200)).body as { rows: JobRow[]; total: number };
const titles = async (query: string): Promise<string[]> => (await list(query)).rows.map((row) => row.title);
const rows = (table: string, where: object = {}) =>
  inShop(api.deps.db, { shopId: shop.id, accountId: null }, (trx) =>
    trx(table)
      .where({ shop_id: shop.id, ...where })
      .select<Record<string, unknown>[]>('*'),
  );

describe('making a job', () => {
  test('takes the stages the options leave, copies their ways and numbers on', async () => {
    const sheet = await aSheet(api.deps.db, shop, optional);
    const plain = await create(newJob(sheet));
    expect(plain).toMatchObject({ number: 1, version: 1, state: 'waiting', endsAt: null, late: false });
    expect(plain.stages.map((stage) => stage.title)).toEqual(['Prepare']);
    expect(plain.stages[0]?.ways).toEqual([aWay()]);
    expect(plain.sheet).toMatchObject({ id: sheet, name: 'Sheet', version: 1 });
    expect(plain.history).toMatchObject([{ kind: 'job-created', by: 'The office', at: expect.any(String) }]);
    const polished = await create(newJob(sheet, { options: ['polish'] }));
    expect(polished.number).toBe(2);
    expect(polished.stages.map((stage) => stage.title)).toEqual(['Prepare', 'Polish']);
  });

  test('keeps its ways when the sheet changes afterwards', async () => {
    const sheet = await aSheet(api.deps.db, shop);
    const { id } = await create(newJob(sheet));
    await inShop(api.deps.db, { shopId: shop.id, accountId: null }, async (trx) => {
      await trx('process_sheet_version').insert({
        shop_id: shop.id,
        id: randomUUID(),
        process_sheet_id: sheet,
        version: 2,
        body: JSON.stringify(aSheetBody({ stages: optional.stages.slice(0, 1) })),
      });
      await trx('process_sheet').where({ shop_id: shop.id, id: sheet }).update({ version: 2 });
    });
    const read: Job = (await api.as(office).get(`${base}/${id}`).expect(200)).body;
    expect(read.stages).toHaveLength(2);
    expect(read.sheet?.version).toBe(1);
    expect((await create(newJob(sheet))).stages).toHaveLength(1);
  });

  test('sent twice, also at once, makes one', async () => {
    const job = newJob(await aSheet(api.deps.db, shop));
    const answers = await Promise.all([create(job), create(job), create(job)]);
    expect(new Set(answers.map((answer) => answer.number))).toEqual(new Set([1]));
    expect((await list()).total).toBe(1);
    expect(await rows('change', { kind: 'job-created' })).toHaveLength(1);
  });

  test('the id of another job is refused, even after that has been changed', async () => {
    const job = newJob(await aSheet(api.deps.db, shop));
    await create(job);
    const answer = await api
      .as(office)
      .post(base)
      .send({ ...job, title: 'Another' })
      .expect(409);
    expect(answer.body.error.code).toBe('key-reused');
    await api.as(office).patch(`${base}/${job.id}`).send({ version: 1, title: 'Changed since' }).expect(200);
    expect((await create(job)).title).toBe('Changed since');
  });

  test('says everything that is wrong at once and writes nothing', async () => {
    const job = newJob(randomUUID(), { releaseAt: '2026-03-09T07:00:00Z' });
    const unknown = await api.as(office).post(base).send(job).expect(400);
    expect(unknown.body.error.fields).toMatchObject([{ path: 'body.sheetId' }, { path: 'body.promiseAt' }]);
    const sheet = await aSheet(api.deps.db, shop, optional);
    const option = await api
      .as(office)
      .post(base)
      .send(newJob(sheet, { options: ['polish', 'gold'] }))
      .expect(400);
    expect(option.body.error.fields).toEqual([
      { path: 'body.options.1', message: 'not an option of this process sheet' },
    ]);
    expect((await list('?state=all')).total).toBe(0);
  });

  test('is not for painters, and not in another shop', async () => {
    const sheet = await aSheet(api.deps.db, shop);
    const painter = await aMember(api.deps.db, shop, { role: 'painter' });
    await api.as(painter).post(base).send(newJob(sheet)).expect(403);
    const other = await aShop(api.deps.db);
    const otherOffice = await aMember(api.deps.db, other, { role: 'office' });
    await api.as(otherOffice).post(base).send(newJob(sheet)).expect(404);
    const theirs = await api.as(otherOffice).post(`/api/shops/${other.id}/jobs`).send(newJob(sheet)).expect(400);
    expect(theirs.body.error.fields[0].path).toBe('body.sheetId');
    const { id } = await create(newJob(sheet));
    await api.as(otherOffice).get(`/api/shops/${other.id}/jobs/${id}`).expect(404);
  });
});

describe('the list', () => {
  test('searches number, title and vehicle, and takes signs literally', async () => {
    await aJob(api.deps.db, shop, { title: 'Bumper 100% new', vehicle: 'Blue van' });
    await aJob(api.deps.db, shop, { title: 'Tailgate', vehicle: 'Grey estate' });
    expect(await titles('?q=blue')).toEqual(['Bumper 100% new']);
    expect(await titles('?q=TAIL')).toEqual(['Tailgate']);
    expect(await titles('?q=2')).toEqual(['Tailgate']);
    expect(await titles('?q=%23' + '1')).toEqual(['Bumper 100% new']);
    expect(await titles('?q=100%25')).toEqual(['Bumper 100% new']);
    expect(await titles('?q=%25')).toEqual(['Bumper 100% new']);
    expect(await titles('?q=_')).toEqual([]);
    expect(await titles("?q='")).toEqual([]);
  });

  test('derives the state from stages and bookings, and tells what comes next', async () => {
    const { db } = api.deps;
    const place = shop.prep;
    const from = new Date('2026-03-03T08:00:00Z');
    await aJob(db, shop, { title: 'waits' });
    const half = await aJob(db, shop, { title: 'half booked' });
    await aBooking(db, shop, { stage: half.stages[0] ?? '', place, from });
    const planned = await aJob(db, shop, { title: 'planned', promiseAt: new Date('2026-03-03T10:30:00Z') });
    await aBooking(db, shop, {
      stage: planned.stages[0] ?? '',
      place: shop.booth,
      from: new Date('2026-03-03T09:00:00Z'),
    });
    await aBooking(db, shop, { stage: planned.stages[1] ?? '', place, from: new Date('2026-03-03T10:00:00Z') });
    const page = await list('?sort=number');
    expect(page.rows.map((row) => [row.title, row.state])).toEqual([
      ['waits', 'waiting'],
      ['half booked', 'waiting'],
      ['planned', 'planned'],
    ]);
    expect(page.rows[1]).toMatchObject({ endsAt: null, next: { title: 'Stage 1', placeName: 'Prep' } });
    // booked until 11:00, promised for 10:30
    expect(page.rows[2]).toMatchObject({
      endsAt: '2026-03-03T11:00:00.000Z',
      late: true,
      stagesDone: 0,
      stagesTotal: 2,
      next: { title: 'Stage 1', startsAt: '2026-03-03T09:00:00.000Z', placeName: 'Booth' },
    });
    const late = await list('?state=late');
    expect(late.rows.map((row) => row.title)).toEqual(['planned']);
    expect(await titles('?state=waiting&sort=number')).toEqual(['waits', 'half booked']);
    expect(await titles('?state=planned')).toEqual(['planned']);
    expect(await titles('?state=running')).toEqual([]);
  });

  test('a job nobody planned is late once its promise has passed', async () => {
    await aJob(api.deps.db, shop, { promiseAt: new Date('2026-03-02T09:00:00Z') });
    expect((await list()).rows[0]?.late).toBe(false);
    api.setClock('2026-03-02T09:00:01Z');
    expect((await list()).rows[0]?.late).toBe(true);
  });

  test('sorts, and pages without losing or doubling a row', async () => {
    for (const [title, promise] of [
      ['beta', '2026-03-05T10:00:00Z'],
      ['Alpha', null],
      ['gamma', '2026-03-04T10:00:00Z'],
      ['delta', '2026-03-05T10:00:00Z'],
    ] as const)
      await aJob(api.deps.db, shop, { title, promiseAt: promise === null ? null : new Date(promise) });
    expect(await titles('?sort=title')).toEqual(['Alpha', 'beta', 'delta', 'gamma']);
    expect(await titles('?sort=promise')).toEqual(['gamma', 'beta', 'delta', 'Alpha']);
    expect(await titles('?sort=-promise')).toEqual(['beta', 'delta', 'gamma', 'Alpha']);
    expect(await titles('?sort=-number')).toEqual(['delta', 'gamma', 'Alpha', 'beta']);
    expect(await titles('?sort=promise&size=3&page=1')).toEqual(['gamma', 'beta', 'delta']);
    expect(await list('?sort=promise&size=3&page=2')).toMatchObject({ rows: [{ title: 'Alpha' }], total: 4 });
    expect(await list('?size=3&page=9')).toEqual({ rows: [], total: 4, page: 9, size: 3 });
  });

  test('shows nothing of another shop', async () => {
    await aJob(api.deps.db, await aShop(api.deps.db), { title: 'Theirs' });
    expect(await list('?state=all')).toMatchObject({ rows: [], total: 0 });
    await api.as(office).get(`${base}?state=sideways`).expect(400);
  });
});

describe('the job page', () => {
  test('shows the chain with windows, bookings and history', async () => {
    const spray = aWay({
      id: 'spray',
      label: 'Sprayed',
      gap: { min: 15, max: 240, settle: 15 },
      phases: [
        { kind: 'spray', minutes: 20, attendance: 'hands' },
        { kind: 'flash', minutes: 10, attendance: 'none' },
      ],
    });
    const job = await aJob(api.deps.db, shop, { stages: [{}, { title: 'Clear', ways: [spray] }] });
    const from = new Date('2026-03-03T08:00:00Z');
    const [first, second] = job.stages as [string, string];
    await aBooking(api.deps.db, shop, { stage: first, place: shop.prep, person: shop.helper, from });
    await aBooking(api.deps.db, shop, {
      stage: second,
      place: shop.booth,
      person: shop.painter,
      lamps: [shop.lamp],
      way: 'spray',
      from: new Date('2026-03-03T09:30:00Z'),
      phases: [20, 10],
    });
    const read: Job = (await api.as(office).get(`${base}/${job.id}`).expect(200)).body;
    expect(read.state).toBe('planned');
    expect(read.endsAt).toBe('2026-03-03T10:00:00.000Z');
    expect(read.stages[0]?.window).toEqual({ earliest: null, latest: null });
    // the first ends 09:00; 15 to 240 minutes later
    expect(read.stages[1]?.window).toEqual({
      earliest: '2026-03-03T09:15:00.000Z',
      latest: '2026-03-03T13:00:00.000Z',
    });
    expect(read.stages[1]?.booking).toMatchObject({
      wayLabel: 'Sprayed',
      placeName: 'Booth',
      personName: 'Painter',
      lampNames: ['Lamp'],
      state: 'planned',
      phases: [
        { kind: 'spray', from: '2026-03-03T09:30:00.000Z', to: '2026-03-03T09:50:00.000Z' },
        { kind: 'flash', from: '2026-03-03T09:50:00.000Z', to: '2026-03-03T10:00:00.000Z' },
      ],
    });
  });
});
