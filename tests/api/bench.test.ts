import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { BenchView } from '#contracts/bench.ts';
import type { Job } from '#contracts/jobs.ts';
import { inShop } from '#server/db/in-shop.ts';
import { benchRoutes } from '#server/http/bench.ts';
import { jobRoutes } from '#server/http/jobs.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aBooking, aJob, aMember, aShop, aWay, type TestJob, type TestShop } from '../helpers/factories-jobs.ts';

let api: TestApi;
let shop: TestShop;
let painter: string;
let helper: string;
let lead: string;

beforeAll(async () => {
  api = await testApi((routes, deps) => {
    jobRoutes(routes, deps);
    benchRoutes(routes, deps);
  }, '2026-03-02T08:00:00Z');
});
afterAll(() => api.close());
beforeEach(async () => {
  api.setClock('2026-03-02T08:00:00.000Z');
  const { db } = api.deps;
  shop = await aShop(db);
  painter = await aMember(db, shop, { role: 'painter', personId: shop.painter });
  helper = await aMember(db, shop, { role: 'painter', personId: shop.helper });
  lead = await aMember(db, shop, { role: 'lead' });
});

const utc = (time: string): Date => new Date(`2026-03-${time}:00Z`);
const stageOf = (job: TestJob, i: number): string => job.stages[i] ?? '';
const tap = (account: string, stage: string, what: 'start' | 'finish', version: number) =>
  api.as(account).post(`/api/shops/${shop.id}/stages/${stage}/${what}`).send({ version });
const bench = async (account: string, query = ''): Promise<BenchView> =>
  (await api.as(account).get(`/api/shops/${shop.id}/bench${query}`).expect(200)).body as BenchView;
const job = async (id: string): Promise<Job> =>
  (await api.as(lead).get(`/api/shops/${shop.id}/jobs/${id}`).expect(200)).body as Job;
const changes = (kind: string) =>
  inShop(api.deps.db, { shopId: shop.id, accountId: null }, (trx) =>
    trx('change').where({ shop_id: shop.id, kind }).orderBy('seq').select<{ ids: string[] }[]>('ids'),
  );

/** Two stages at the prep station, 09:00 and 10:00 UTC, both the painter's. */
async function twoStages(): Promise<TestJob> {
  const made = await aJob(api.deps.db, shop);
  for (const [i, stage] of made.stages.entries())
    await aBooking(api.deps.db, shop, {
      stage,
      place: shop.prep,
      person: shop.painter,
      from: utc(`02T${String(9 + i).padStart(2, '0')}:00`),
    });
  return made;
}

describe('starting and finishing', () => {
  test('runs by the server clock, stage by stage, until the job is done', async () => {
    const made = await twoStages();
    const [first, second] = [stageOf(made, 0), stageOf(made, 1)];
    api.setClock('2026-03-02T09:04:00.000Z');
    expect((await tap(painter, first, 'start', 1).expect(200)).body).toEqual({ version: 2, air: null });
    expect(await job(made.id)).toMatchObject({ state: 'running', stages: [{ booking: { state: 'running' } }, {}] });
    const early = await tap(painter, second, 'start', 1).expect(422);
    expect(early.body.error.reasons).toMatchObject([
      { code: 'previous-not-done', rule: 1, stageId: second, ids: [first], names: ['Stage 1'] },
    ]);
    api.setClock('2026-03-02T09:58:00.000Z');
    expect((await tap(painter, first, 'finish', 2).expect(200)).body).toEqual({ version: 3 });
    await tap(painter, second, 'start', 1).expect(200);
    api.setClock('2026-03-02T11:10:00.000Z');
    await tap(painter, second, 'finish', 2).expect(200);
    const done = await job(made.id);
    expect(done).toMatchObject({ state: 'done', endsAt: '2026-03-02T11:10:00.000Z' });
    expect(done.stages.map((stage) => [stage.startedAt, stage.finishedAt, stage.booking?.state])).toEqual([
      ['2026-03-02T09:04:00.000Z', '2026-03-02T09:58:00.000Z', 'done'],
      ['2026-03-02T09:58:00.000Z', '2026-03-02T11:10:00.000Z', 'done'],
    ]);
    expect(done.history.map((line) => line.kind)).toEqual([
      'stage-finished',
      'stage-started',
      'stage-finished',
      'stage-started',
    ]);
    expect((await changes('stage-finished')).map((line) => line.ids)).toEqual([
      [first, made.id],
      [second, made.id],
    ]);
  });

  test('tapped twice counts once, and keeps the first time', async () => {
    const made = await twoStages();
    const stage = stageOf(made, 0);
    const taps = await Promise.all([1, 2, 3].map(() => tap(painter, stage, 'start', 1)));
    expect(taps.map((answer) => [answer.status, answer.body as unknown])).toEqual(
      Array(3).fill([200, { version: 2, air: null }]),
    );
    api.setClock('2026-03-02T09:30:00.000Z');
    await tap(painter, stage, 'start', 1).expect(200);
    await tap(painter, stage, 'finish', 2).expect(200);
    api.setClock('2026-03-02T09:40:00.000Z');
    await tap(painter, stage, 'finish', 2).expect(200, { version: 3 });
    await tap(painter, stage, 'start', 1).expect(200, { version: 3, air: null });
    expect((await job(made.id)).stages[0]).toMatchObject({
      startedAt: '2026-03-02T08:00:00.000Z',
      finishedAt: '2026-03-02T09:30:00.000Z',
    });
    expect(await changes('stage-started')).toHaveLength(1);
    expect(await changes('stage-finished')).toHaveLength(1);
  });

  test('with an old version is refused, with what it is now', async () => {
    const stage = stageOf(await twoStages(), 0);
    const stale = await tap(painter, stage, 'start', 9).expect(409);
    expect(stale.body.error).toMatchObject({ code: 'stale', current: { id: stage, version: 1, state: 'waiting' } });
    await tap(painter, stage, 'start', 1).expect(200);
    await tap(painter, stage, 'finish', 1).expect(409);
  });

  test('is for the one it is booked for, or a lead', async () => {
    const stage = stageOf(await twoStages(), 0);
    await tap(helper, stage, 'start', 1).expect(403);
    const office = await aMember(api.deps.db, shop, { role: 'office' });
    await tap(office, stage, 'start', 1).expect(403);
    const elsewhere = await aMember(api.deps.db, await aShop(api.deps.db), { role: 'lead' });
    await tap(elsewhere, stage, 'start', 1).expect(404);
    await tap(lead, randomUUID(), 'start', 1).expect(404);
    await tap(lead, stage, 'start', 1).expect(200);
    await tap(helper, stage, 'finish', 2).expect(403);
  });

  test('is refused without a booking, before the start, and when the job was withdrawn', async () => {
    const loose = await aJob(api.deps.db, shop);
    const unbooked = await tap(lead, stageOf(loose, 0), 'start', 1).expect(422);
    expect(unbooked.body.error.reasons[0].code).toBe('not-booked');
    await tap(painter, stageOf(loose, 0), 'start', 1).expect(403);
    const made = await twoStages();
    const unstarted = await tap(painter, stageOf(made, 0), 'finish', 1).expect(422);
    expect(unstarted.body.error.reasons[0].code).toBe('not-started');
    await api.as(lead).post(`/api/shops/${shop.id}/jobs/${made.id}/withdraw`).send({ version: 1 }).expect(200);
    const withdrawn = await tap(lead, stageOf(made, 0), 'start', 1).expect(422);
    expect(withdrawn.body.error.reasons[0].code).toBe('job-withdrawn');
  });

  test('one tap counts for the whole load, except for who is not ready', async () => {
    const { db } = api.deps;
    const load = randomUUID();
    const jobs = [
      await aJob(db, shop, { title: 'Mirror', stages: [{}] }),
      await aJob(db, shop, { title: 'Cap', stages: [{}] }),
      await aJob(db, shop, { title: 'Strip' }),
    ];
    const members = [stageOf(jobs[0]!, 0), stageOf(jobs[1]!, 0), stageOf(jobs[2]!, 1)];
    for (const stage of members)
      await aBooking(db, shop, { stage, place: shop.booth, person: shop.painter, from: utc('02T09:00'), load });
    expect((await bench(painter)).stages.map((stage) => [stage.jobTitle, stage.sharedWith, stage.ready])).toEqual([
      ['Mirror', ['Cap', 'Strip'], true],
      ['Cap', ['Mirror', 'Strip'], true],
      ['Strip', ['Mirror', 'Cap'], false],
    ]);
    await tap(painter, members[0]!, 'start', 1).expect(200);
    expect((await bench(painter)).stages.map((stage) => stage.state)).toEqual(['running', 'running', 'waiting']);
    await tap(painter, members[1]!, 'start', 1).expect(200, { version: 2, air: null });
    await tap(painter, members[1]!, 'finish', 2).expect(200);
    expect((await bench(painter)).stages.map((stage) => stage.state)).toEqual(['done', 'done', 'waiting']);
    expect((await job(jobs[0]!.id)).state).toBe('done');
    expect((await job(jobs[2]!.id)).state).toBe('waiting');
  });
});

describe('the bench', () => {
  test('shows the own stages of the local day, in order, with clocks and windows', async () => {
    const { db } = api.deps;
    const made = await twoStages();
    const other = await aJob(db, shop, { title: 'Not mine' });
    await aBooking(db, shop, {
      stage: stageOf(other, 0),
      place: shop.booth,
      person: shop.helper,
      from: utc('02T09:00'),
    });
    const tomorrow = await aJob(db, shop, { title: 'Tomorrow' });
    // Midnight in Amsterdam is 23:00 UTC in winter: this one begins on the 3rd there.
    await aBooking(db, shop, {
      stage: stageOf(tomorrow, 0),
      place: shop.booth,
      person: shop.painter,
      from: utc('02T23:00'),
    });
    const view = await bench(painter);
    expect(view.day).toBe('2026-03-02');
    expect(view.person?.name).toBe('Painter');
    // shift 08:00 to 16:30 with half an hour after four hours, Amsterdam being one hour ahead
    expect(view.working).toEqual([
      { from: '2026-03-02T07:00:00.000Z', to: '2026-03-02T11:00:00.000Z' },
      { from: '2026-03-02T11:30:00.000Z', to: '2026-03-02T15:30:00.000Z' },
    ]);
    expect(view.stages.map((stage) => [stage.id, stage.ready])).toEqual([
      [made.stages[0], true],
      [made.stages[1], false],
    ]);
    expect(view.stages[1]).toMatchObject({
      partNames: 'Panel',
      placeName: 'Prep',
      from: '2026-03-02T10:00:00.000Z',
      to: '2026-03-02T11:00:00.000Z',
      window: { earliest: '2026-03-02T10:00:00.000Z', latest: null },
      phases: [{ kind: 'work', from: '2026-03-02T10:00:00.000Z', to: '2026-03-02T11:00:00.000Z' }],
    });
    expect((await bench(painter, '?day=2026-03-03')).stages.map((stage) => stage.jobTitle)).toEqual(['Tomorrow']);
  });

  test('keeps what runs on every day, and what was never begun on the present one', async () => {
    const made = await twoStages();
    await tap(painter, stageOf(made, 0), 'start', 1).expect(200);
    api.setClock('2026-03-04T08:00:00.000Z');
    expect((await bench(painter)).stages.map((stage) => stage.state)).toEqual(['running', 'waiting']);
    expect((await bench(painter, '?day=2026-03-09')).stages.map((stage) => stage.state)).toEqual(['running']);
  });

  test('work without hands stands on the bench of who comes before and of who comes after', async () => {
    const { db } = api.deps;
    const cure = aWay({ id: 'air', skill: null, phases: [{ kind: 'flash', minutes: 60, attendance: 'none' }] });
    const made = await aJob(db, shop, { stages: [{}, { title: 'Cure', ways: [cure] }, {}] });
    const book = (i: number, person: string | null, time: string, way = 'by-hand') =>
      aBooking(db, shop, { stage: stageOf(made, i), place: shop.prep, person, from: utc(time), way });
    await book(0, shop.painter, '02T09:00');
    await book(1, null, '02T10:00', 'air');
    await book(2, shop.helper, '02T11:00');
    expect((await bench(painter)).stages.map((stage) => stage.title)).toEqual(['Stage 1', 'Cure']);
    expect((await bench(helper)).stages.map((stage) => stage.title)).toEqual(['Cure', 'Stage 3']);
    await tap(painter, stageOf(made, 0), 'start', 1).expect(200);
    await tap(painter, stageOf(made, 0), 'finish', 2).expect(200);
    await tap(helper, stageOf(made, 1), 'start', 1).expect(200);
    await tap(painter, stageOf(made, 1), 'finish', 2).expect(200);
  });

  test('of somebody else is for leads; an account that is nobody has an empty one', async () => {
    const made = await twoStages();
    expect((await bench(lead, `?personId=${shop.painter}`)).stages[0]?.id).toBe(made.stages[0]);
    await api.as(helper).get(`/api/shops/${shop.id}/bench?personId=${shop.painter}`).expect(403);
    await api.as(lead).get(`/api/shops/${shop.id}/bench?personId=${randomUUID()}`).expect(404);
    expect(await bench(lead)).toMatchObject({ person: null, working: [], stages: [] });
    await api.as(painter).get(`/api/shops/${shop.id}/bench?day=2026-02-30`).expect(400);
  });
});
