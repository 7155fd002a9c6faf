import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { Job, JobRow, NewJob } from '#contracts/jobs.ts';
import { inShop } from '#server/db/in-shop.ts';
import { benchRoutes } from '#server/http/bench.ts';
import { jobRoutes } from '#server/http/jobs.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aBooking, aDraft, aJob, aMember, aSheet, aShop, newJob, type TestShop } from '../helpers/factories-jobs.ts';

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

describe('changing a job', () => {
  test('writes what differs, once, and keeps what it was', async () => {
    const { id } = await create(newJob(await aSheet(api.deps.db, shop)));
    const change = { version: 1, title: 'Door, right front', promiseAt: null, vehicle: 'Grey estate' };
    const changed: Job = (await api.as(office).patch(`${base}/${id}`).send(change).expect(200)).body;
    expect(changed).toMatchObject({ version: 2, title: 'Door, right front', promiseAt: null });
    expect(changed.history[0]).toMatchObject({
      kind: 'job-changed',
      detail: {
        before: { title: 'Door, left front', promiseAt: '2026-03-06T16:00:00.000Z' },
        after: { title: 'Door, right front', promiseAt: null },
      },
    });
    // The same request again finds nothing to do, although its version is old.
    const again: Job = (await api.as(office).patch(`${base}/${id}`).send(change).expect(200)).body;
    expect(again.version).toBe(2);
    expect(again.history).toHaveLength(2);
  });

  test('with an old version is refused, with the job as it is now', async () => {
    const { id } = await create(newJob(await aSheet(api.deps.db, shop)));
    await api.as(office).patch(`${base}/${id}`).send({ version: 1, weight: 3 }).expect(200);
    const stale = await api.as(office).patch(`${base}/${id}`).send({ version: 1, title: 'Mine' }).expect(409);
    expect(stale.body.error).toMatchObject({ code: 'stale', current: { id, version: 2, weight: 3 } });
  });

  test('of two at once one wins', async () => {
    const { id } = await create(newJob(await aSheet(api.deps.db, shop)));
    const both = await Promise.all(
      ['A', 'B'].map((title) => api.as(office).patch(`${base}/${id}`).send({ version: 1, title })),
    );
    expect(both.map((answer) => answer.status).sort()).toEqual([200, 409]);
  });

  test('a promise before the arrival, unknown fields and unknown jobs are refused', async () => {
    const { id } = await create(newJob(await aSheet(api.deps.db, shop)));
    const early = await api
      .as(office)
      .patch(`${base}/${id}`)
      .send({ version: 1, promiseAt: '2026-03-01T00:00:00Z' })
      .expect(400);
    expect(early.body.error.fields[0].path).toBe('body.promiseAt');
    await api.as(office).patch(`${base}/${id}`).send({ version: 1, state: 'done' }).expect(400);
    await api.as(office).patch(`${base}/${randomUUID()}`).send({ version: 1, title: 'x' }).expect(404);
  });
});

describe('withdrawing a job', () => {
  const booked = async () => {
    const job = await aJob(api.deps.db, shop);
    for (const [i, stage] of job.stages.entries())
      await aBooking(api.deps.db, shop, {
        stage,
        place: shop.prep,
        person: shop.painter,
        from: new Date(`2026-03-03T${i + 10}:00:00Z`),
      });
    return job;
  };

  test('cancels its bookings, frees what they held, and takes it out of the draft', async () => {
    const job = await booked();
    const draft = await aDraft(api.deps.db, shop);
    await aBooking(api.deps.db, shop, {
      stage: job.stages[0] ?? '',
      place: shop.prep,
      from: new Date('2026-03-04T10:00:00Z'),
      draft,
    });
    const gone: Job = (await api.as(office).post(`${base}/${job.id}/withdraw`).send({ version: 1 }).expect(200)).body;
    expect(gone).toMatchObject({ state: 'withdrawn', version: 2, endsAt: null, late: false });
    expect(gone.stages.every((stage) => stage.booking === null)).toBe(true);
    expect(gone.history[0]).toMatchObject({ kind: 'job-withdrawn', detail: { bookings: 2 } });
    expect(await rows('occupancy')).toEqual([]);
    expect((await rows('booking')).map((row) => row.state)).toEqual(['cancelled', 'cancelled']);
    expect(await rows('draft_item')).toEqual([]);
    expect(await rows('draft')).toMatchObject([{ version: 2 }]);
    expect((await rows('change')).map((row) => row.kind).sort()).toEqual(['draft-changed', 'job-withdrawn']);
    expect(await titles('')).toEqual([]);
    expect(await titles('?state=withdrawn')).toEqual(['Job 1']);
    // twice is once
    await api.as(office).post(`${base}/${job.id}/withdraw`).send({ version: 1 }).expect(200);
    expect(await rows('change', { kind: 'job-withdrawn' })).toHaveLength(1);
  });

  test('is refused while somebody works on it, and with an old version', async () => {
    const job = await booked();
    const lead = await aMember(api.deps.db, shop, { role: 'lead' });
    await api.as(office).post(`${base}/${job.id}/withdraw`).send({ version: 7 }).expect(409);
    await api.as(lead).post(`/api/shops/${shop.id}/stages/${job.stages[0]}/start`).send({ version: 1 }).expect(200);
    const refused = await api.as(office).post(`${base}/${job.id}/withdraw`).send({ version: 1 }).expect(422);
    expect(refused.body.error.reasons).toMatchObject([{ code: 'stage-running', stageId: job.stages[0] }]);
    expect(await rows('occupancy')).toHaveLength(2);
    await api.as(office).patch(`${base}/${job.id}`).send({ version: 1, notes: 'still here' }).expect(200);
  });

  test('keeps what was done', async () => {
    const job = await booked();
    const lead = await aMember(api.deps.db, shop, { role: 'lead' });
    const stage = `/api/shops/${shop.id}/stages/${job.stages[0]}`;
    await api.as(lead).post(`${stage}/start`).send({ version: 1 }).expect(200);
    await api.as(lead).post(`${stage}/finish`).send({ version: 2 }).expect(200);
    const gone: Job = (await api.as(office).post(`${base}/${job.id}/withdraw`).send({ version: 1 }).expect(200)).body;
    expect(gone.stages.map((s) => [s.state, s.booking?.state])).toEqual([
      ['done', 'done'],
      ['waiting', undefined],
    ]);
    const late = await api.as(office).patch(`${base}/${job.id}`).send({ version: 2, title: 'x' }).expect(422);
    expect(late.body.error.reasons[0].code).toBe('job-withdrawn');
  });
});
