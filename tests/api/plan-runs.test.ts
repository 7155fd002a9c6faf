import { randomUUID } from 'node:crypto';
import { Worker } from 'node:worker_threads';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { PlanRun } from '#contracts/day.ts';
import { draftRoutes } from '#server/http/drafts.ts';
import { openPlannerThreads, type PlannerThreads } from '#server/planning/planner-threads.ts';
import { runPlan } from '#server/services/run-plan.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aBooking, aJob, aMember } from '../helpers/factories-jobs.ts';
import { aPlanShop, air, bake, spray, utc, type PlanShop } from './drafts-shop.ts';

let api: TestApi;
let shop: PlanShop;
const threads = openPlannerThreads(1);
beforeAll(async () => {
  api = await testApi(draftRoutes, '2026-03-02T06:30:00Z');
});
afterAll(async () => {
  await threads.close();
  await api.close();
});
beforeEach(async () => {
  shop = await aPlanShop(api.deps.db);
});

const runs = (path = ''): string => `/api/shops/${shop.id}/plan-runs${path}`;
const ask = (body: object = {}, account = shop.lead) =>
  api
    .as(account)
    .post(runs())
    .send({ id: randomUUID(), scope: 'all', seconds: 1, seed: 1, ...body });
const work = (runId: string, by: PlannerThreads = threads, signal = new AbortController().signal) =>
  runPlan(api.deps, by, { shopId: shop.id, runId }, signal);
const read = async (runId: string): Promise<PlanRun> => {
  const answer = await api
    .as(shop.lead)
    .get(runs(`/${runId}`))
    .expect(200);
  return answer.body as PlanRun;
};
const rows = (table: string): Promise<Record<string, unknown>[]> =>
  shop.in((trx) => trx(table).where({ shop_id: shop.id }).select('*')) as Promise<Record<string, unknown>[]>;
const open = async () =>
  (await api.as(shop.lead).post(`/api/shops/${shop.id}/draft`).send({}).expect(200)).body as {
    id: string;
    version: number;
  };
const panel = (title: string, given: { electric?: boolean } = {}) =>
  aJob(api.deps.db, shop, {
    title,
    stages: [
      { title: 'Clear', ways: [spray] },
      { title: 'Bake', ways: given.electric ? [bake] : [bake, air] },
    ],
  });

/** Threads whose answer waits until it is let go. */
function held() {
  let letGo = (): void => undefined;
  const gate = new Promise<void>((resolve) => (letGo = resolve));
  let begun = (): void => undefined;
  const started = new Promise<void>((resolve) => (begun = resolve));
  const by: PlannerThreads = {
    close: async () => undefined,
    search: (request) => {
      const search = threads.search({ ...request, evaluations: 2 });
      begun();
      return { stop: () => search.stop(), plan: search.plan.then((plan) => gate.then(() => plan)) };
    },
  };
  return { by, started, letGo: () => letGo() };
}

describe('a run', () => {
  it('is queued once, however often it is asked for, and only one at a time', async () => {
    const id = randomUUID();
    const [one, two] = await Promise.all([ask({ id }), ask({ id })]);
    expect([one.status, two.status]).toEqual([200, 200]);
    expect(two.body).toEqual(one.body);
    expect(one.body).toMatchObject({ id, state: 'queued', scope: 'all' });
    const other = await ask().expect(429);
    expect(other.headers['retry-after']).toBeDefined();
    expect(await rows('task')).toMatchObject([{ kind: 'run-plan', key: id, payload: { runId: id } }]);
    shop = await aPlanShop(api.deps.db);
    const statuses = (await Promise.all(Array.from({ length: 6 }, () => ask()))).map(({ status }) => status);
    expect(statuses.filter((status) => status === 200)).toHaveLength(1);
  });

  it('replaces the draft whole, says who found no room and why, and tells the screens', async () => {
    const jobs = [await panel('One'), await panel('Two'), await panel('Three')];
    const electric = await panel('Electric', { electric: true });
    await shop.in((trx) => trx('job').where({ shop_id: shop.id, id: electric.id }).update({ electric: true }));
    const { body } = await ask();
    await work(body.id);
    const run = await read(body.id);
    expect(run).toMatchObject({ state: 'done', failure: null, progress: { unplaced: 1 } });
    const [draft] = await rows('draft');
    expect(draft).toMatchObject({ state: 'open', version: 2, updated_by: shop.lead });
    expect(draft?.['unplaced']).toMatchObject([
      { jobId: electric.id, reason: expect.stringMatching(/Booth bake .* heat limit of 49 C/) },
    ]);
    const items = await rows('draft_item');
    expect(items.map((item) => item['stage_id']).sort()).toEqual(jobs.flatMap(({ stages }) => stages).sort());
    const compared = await api.as(shop.lead).get(`/api/shops/${shop.id}/draft/compare`).expect(200);
    expect(compared.body.reasons).toEqual([]);
    await api.as(shop.lead).post(`/api/shops/${shop.id}/draft/post`).send({ version: 2 }).expect(200);
    const kinds = (await rows('change')).map(({ kind }) => kind);
    expect(kinds).toEqual(expect.arrayContaining(['plan-run', 'draft-opened', 'plan-posted']));
    // A second worker that takes the same task finds it done.
    await work(body.id);
    expect(await rows('draft')).toHaveLength(1);
  });

  it('for the rest leaves what is booked where it is', async () => {
    const [first = ''] = (await panel('One')).stages;
    await aBooking(api.deps.db, shop, {
      stage: first,
      place: shop.booth,
      person: shop.painter,
      from: utc('03T08:00'),
      way: 'spray',
      phases: [20, 10],
    });
    await panel('Two');
    const { body } = await ask({ scope: 'rest' });
    await work(body.id);
    const from = await shop.in((trx) =>
      trx('draft_item').where({ shop_id: shop.id, stage_id: first }).first(trx.raw('lower(during) as "from"')),
    );
    expect((from as unknown as { from: Date }).from).toEqual(utc('03T08:00'));
    expect(await rows('draft_item')).toHaveLength(4);
  });

  it('ends soon after it is told to stop, with the best plan so far', async () => {
    for (let i = 0; i < 8; i++) await panel(`Job ${i}`);
    const { body } = await ask({ seconds: 120 });
    const working = work(body.id);
    await expect.poll(async () => (await read(body.id)).progress).not.toBeNull();
    await api
      .as(shop.other)
      .post(runs(`/${body.id}/stop`))
      .send({})
      .expect(200);
    await working;
    expect(await read(body.id)).toMatchObject({ state: 'stopped' });
    expect((await rows('draft_item')).length).toBeGreaterThan(0);
    // Stopping again changes nothing, and the next run may begin.
    await api
      .as(shop.lead)
      .post(runs(`/${body.id}/stop`))
      .send({})
      .expect(200);
    await ask().expect(200);
  });

  it('that was stopped before it began plans nothing', async () => {
    await panel('One');
    const { body } = await ask();
    await api
      .as(shop.lead)
      .post(runs(`/${body.id}/stop`))
      .send({})
      .expect(200);
    await work(body.id);
    expect(await read(body.id)).toMatchObject({ state: 'stopped', startedAt: null });
    expect(await rows('draft')).toEqual([]);
  });

  it('does not undo what somebody changed by hand meanwhile', async () => {
    const [first = ''] = (await panel('One')).stages;
    const draft = await open();
    const { body } = await ask();
    const { by, started, letGo } = held();
    const working = work(body.id, by);
    await started;
    await api
      .as(shop.other)
      .post(`/api/shops/${shop.id}/draft/stages/${first}/move`)
      .send({ version: draft.version, start: utc('02T09:00'), placeId: shop.booth })
      .expect(200);
    letGo();
    await working;
    expect(await read(body.id)).toMatchObject({ state: 'failed', failure: expect.stringMatching(/changed by hand/) });
    expect((await rows('draft_item')).map((item) => item['stage_id'])).toEqual([first]);
  });

  it('that commits while somebody posts: either order, never both', async () => {
    for (let round = 0; round < 4; round++) {
      shop = await aPlanShop(api.deps.db);
      const [first = ''] = (await panel('One')).stages;
      await panel('Two');
      const draft = await open();
      await api
        .as(shop.lead)
        .post(`/api/shops/${shop.id}/draft/stages/${first}/move`)
        .send({ version: draft.version, start: utc('02T13:00'), placeId: shop.booth })
        .expect(200);
      const { body } = await ask();
      const { by, started, letGo } = held();
      const working = work(body.id, by);
      await started;
      const posting = api.as(shop.lead).post(`/api/shops/${shop.id}/draft/post`).send({ version: 2 });
      letGo();
      const [posted] = await Promise.all([posting, working]);
      const run = await read(body.id);
      expect([posted.status, run.state]).toEqual(posted.status === 200 ? [200, 'failed'] : [409, 'done']);
      expect(await rows('booking')).toHaveLength(posted.status === 200 ? 1 : 0);
    }
  });

  it('whose thread dies is tried once more', async () => {
    await panel('One');
    const { body } = await ask();
    let started = 0;
    const flaky: PlannerThreads = {
      close: async () => undefined,
      search: (request) => {
        started += 1;
        return started === 1 ? dying.search(request) : threads.search({ ...request, evaluations: 2 });
      },
    };
    await work(body.id, flaky);
    expect(await read(body.id)).toMatchObject({ state: 'done' });
  });

  const dying = openPlannerThreads(
    1,
    () => new Worker(`require('node:worker_threads').parentPort.on('message', () => process.exit(7))`, { eval: true }),
  );
  afterAll(() => dying.close());

  it('whose thread dies twice has failed, in plain words, and the old draft is whole', async () => {
    const [first = ''] = (await panel('One')).stages;
    const draft = await open();
    await api
      .as(shop.lead)
      .post(`/api/shops/${shop.id}/draft/stages/${first}/move`)
      .send({ version: draft.version, start: utc('02T09:00'), placeId: shop.booth })
      .expect(200);
    const before = await rows('draft_item');
    const { body } = await ask();
    await work(body.id, dying);
    expect(await read(body.id)).toMatchObject({
      state: 'failed',
      failure: expect.stringMatching(/Nothing was changed/),
    });
    expect(await rows('draft_item')).toEqual(before);
    await ask().expect(200);
  });

  it('that a worker left behind is begun anew by the next', async () => {
    await panel('One');
    const { body } = await ask();
    const leaving = new AbortController();
    const { by, started, letGo } = held();
    const working = work(body.id, by, leaving.signal);
    await started;
    leaving.abort();
    letGo();
    await expect(working).rejects.toThrow();
    expect(await read(body.id)).toMatchObject({ state: 'running' });
    expect(await rows('draft')).toEqual([]);
    await work(body.id, { ...threads, search: (request) => threads.search({ ...request, evaluations: 2 }) });
    expect(await read(body.id)).toMatchObject({ state: 'done' });
  });

  it('of another shop is not found, and painters may look but not start', async () => {
    const { body } = await ask();
    const painter = await aMember(api.deps.db, shop, { role: 'painter' });
    await api
      .as(painter)
      .get(runs(`/${body.id}`))
      .expect(200);
    await ask({}, painter).expect(403);
    shop = await aPlanShop(api.deps.db);
    await api
      .as(shop.lead)
      .get(runs(`/${body.id}`))
      .expect(404);
    await api
      .as(shop.lead)
      .post(runs(`/${body.id}/stop`))
      .send({})
      .expect(404);
  });
});
