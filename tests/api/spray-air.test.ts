import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { BenchView, SprayAir } from '#contracts/bench.ts';
import type { DayView } from '#contracts/day.ts';
import type { Job } from '#contracts/jobs.ts';
import { airRoutes } from '#server/http/air.ts';
import { benchRoutes } from '#server/http/bench.ts';
import { dayRoutes } from '#server/http/day.ts';
import { draftRoutes } from '#server/http/drafts.ts';
import { jobRoutes } from '#server/http/jobs.ts';
import { openPlannerThreads } from '#server/planning/planner-threads.ts';
import { runPlan } from '#server/services/run-plan.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { figures } from '../helpers/factories-air.ts';
import { aBooking, aJob, aMember } from '../helpers/factories-jobs.ts';
import { aPlanShop, codesOf, reasonsOf, spray, utc, type PlanShop } from './drafts-shop.ts';

let api: TestApi;
let shop: PlanShop;
let painter: string;
let zone: string;
const threads = openPlannerThreads(1);
beforeAll(async () => {
  api = await testApi((routes, deps) => {
    for (const noun of [jobRoutes, benchRoutes, dayRoutes, draftRoutes, airRoutes]) noun(routes, deps);
  }, '2026-03-02T08:00:00Z');
});
afterAll(async () => {
  await threads.close();
  await api.close();
});
beforeEach(async () => {
  api.setClock('2026-03-02T08:00:00Z');
  shop = await aPlanShop(api.deps.db);
  painter = await aMember(api.deps.db, shop, { role: 'painter', personId: shop.painter });
  zone = randomUUID();
  await shop.in(async (trx) => {
    await trx('zone').insert({ shop_id: shop.id, id: zone, name: 'Booth air' });
    await trx('place').where({ shop_id: shop.id, id: shop.booth }).update({ zone_id: zone });
  });
});

const at = (path: string) => `/api/shops/${shop.id}/${path}`;
const read = (celsius: number, humidity: number, given: { at?: string; surfaceCelsius?: number | null } = {}) =>
  api
    .as(painter)
    .post(at(`air/zones/${zone}/readings`))
    .send(figures({ at: '2026-03-02T07:50:00Z', celsius, humidity, ...given }))
    .expect(200);
async function coat(from = utc('02T08:00')): Promise<{ job: string; stage: string }> {
  const job = await aJob(api.deps.db, shop, { title: 'Bonnet', stages: [{ title: 'Clear', ways: [spray] }] });
  const stage = job.stages[0] ?? '';
  const person = shop.painter;
  await aBooking(api.deps.db, shop, {
    stage,
    place: shop.booth,
    person,
    way: 'spray',
    phases: [20, 10],
    from,
  });
  return { job: job.id, stage };
}
const start = (stage: string, body: object = {}, account = painter) =>
  api
    .as(account)
    .post(at(`stages/${stage}/start`))
    .send({ version: 1, ...body });
const airOf = (answer: { body: unknown }) => (answer.body as { air: SprayAir | null }).air;

describe('a start of spraying', () => {
  // Worked case of ISO 8502-4 practice: 16 C, 71 %: dew point 11, surface 13: refuse.
  test('is held up where the surface is too near the dew point, with the figures', async () => {
    await read(16, 71, { surfaceCelsius: 13 });
    const { stage } = await coat();
    const refused = await start(stage).expect(422);
    expect(codesOf(refused)).toEqual(['dew-point']);
    const [reason] = reasonsOf(refused);
    expect(reason).toMatchObject({
      stageId: stage,
      ids: [zone],
      names: ['Booth air'],
      at: ['2026-03-02T07:50:00.000Z'],
    });
    const [air, humidity, surface, dew, margin, needed, measured] = reason?.minutes ?? [];
    expect([air, humidity, surface, needed, measured]).toEqual([16, 71, 13, 3, 1]);
    expect(Math.round(dew ?? 0)).toBe(11);
    expect(margin).toBeCloseTo(13 - (dew ?? 0), 9);
    const bench = (await api.as(painter).get(at('bench')).expect(200)).body as BenchView;
    expect(bench.stages[0]).toMatchObject({ state: 'waiting', air: { zoneName: 'Booth air', gate: { open: false } } });
  });

  // Worked case: dry bulb 21 C, wet bulb 17 C: dew point 15, surface 19: fine. That air holds about 68 % (psychrometric chart).
  test('goes ahead where it is warm enough, and says what was seen', async () => {
    await read(21, 68, { surfaceCelsius: 19 });
    const { stage } = await coat();
    expect(airOf(await start(stage).expect(200))).toMatchObject({
      zoneName: 'Booth air',
      gate: { open: true, fresh: true },
    });
  });

  test('is only warned about where nobody has measured, or too long ago', async () => {
    const unknown = await coat();
    expect(airOf(await start(unknown.stage).expect(200))).toEqual({ zoneName: 'Booth air', reading: null, gate: null });
    await read(16, 71, { surfaceCelsius: 13, at: '2026-03-02T05:59:00Z' });
    const old = await coat(utc('02T09:00'));
    expect(airOf(await start(old.stage).expect(200))).toMatchObject({ gate: { open: false, fresh: false } });
  });

  test('who leads may have it started all the same, with a reason that stays with the stage and in the history', async () => {
    await read(16, 71, { surfaceCelsius: 13 });
    const { job, stage } = await coat();
    const reason = 'Part was warmed to 25 C by the lamp, measured by hand.';
    await start(stage, { overrule: reason }).expect(403);
    await start(stage, { overrule: 'x' }, shop.lead).expect(400);
    await start(stage, { overrule: reason }, shop.lead).expect(200);
    const seen = (
      await api
        .as(painter)
        .get(at(`jobs/${job}`))
        .expect(200)
    ).body as Job;
    expect(seen.stages[0]?.overruled).toMatchObject({
      rule: 'dew-point',
      reason,
      by: 'The lead',
      at: '2026-03-02T08:00:00.000Z',
    });
    expect(seen.stages[0]?.overruled?.figures.slice(0, 3)).toEqual([16, 71, 13]);
    expect(seen.history[0]).toMatchObject({ kind: 'stage-started', by: 'The lead', detail: { overruled: { reason } } });
  });

  test('of anything else has nothing to do with the air', async () => {
    await read(16, 71, { surfaceCelsius: 13 });
    const job = await aJob(api.deps.db, shop, { stages: [{}] });
    const stage = job.stages[0] ?? '';
    await aBooking(api.deps.db, shop, { stage, place: shop.booth, person: shop.painter, from: utc('02T08:00') });
    expect(airOf(await start(stage).expect(200))).toBeNull();
  });
});

describe('the air of a plan', () => {
  const day = async () =>
    (await api.as(painter).get(at('day?from=2026-03-02T00:00:00Z&to=2026-03-03T00:00:00Z')).expect(200))
      .body as DayView;
  const desk = () => api.as(shop.lead);
  const takeLatest = () =>
    desk()
      .patch(at(`air/zones/${zone}`))
      .send({ version: 0, source: 'latest', schedule: [] })
      .expect(200);
  async function planAndPost(): Promise<void> {
    const id = randomUUID();
    await desk().post(at('plan-runs')).send({ id, scope: 'all', seconds: 1, seed: 1 }).expect(200);
    await runPlan(api.deps, threads, { shopId: shop.id, runId: id }, new AbortController().signal);
    const { draft } = await day();
    await desk().post(at('draft/post')).send({ version: draft?.version }).expect(200);
  }
  const flash = async () => (await day()).bars[0]?.phases.find(({ kind }) => kind === 'flash');
  const minutes = (phase: { from: string; to: string } | undefined) =>
    phase && (Date.parse(phase.to) - Date.parse(phase.from)) / 60_000;

  test('the latest reading of each zone stands above the day', async () => {
    await read(19, 55, { surfaceCelsius: 18 });
    expect((await day()).air).toMatchObject([
      { zoneId: zone, name: 'Booth air', celsius: 19, humidity: 55, gate: { open: true } },
    ]);
    api.setClock('2026-03-03T08:00:00Z');
    expect((await day()).air).toEqual([]);
  });

  test('planned in the cold a flash is longer; when it warms up the plan says so until it is planned and posted anew', async () => {
    await takeLatest();
    await read(10, 50);
    await aJob(api.deps.db, shop, {
      title: 'Bonnet',
      stages: [{ title: 'Clear', ways: [{ ...spray, placeKinds: ['booth'] }] }],
    });
    await shop.in((trx) => trx('place').where({ shop_id: shop.id, id: shop.cold }).update({ retired_at: new Date() }));
    await planAndPost();
    // 10 min set for 20 C, at 10 C times exp(50000 / 8.314462618 x (1/283.15 - 1/293.15)) = 2.0637: 21 whole minutes.
    expect(minutes(await flash())).toBe(21);
    expect((await day()).posted.changedAir).toEqual([]);
    await read(12.9, 50, { at: '2026-03-02T07:55:00Z' });
    expect((await day()).posted.changedAir).toEqual([]);
    await read(13.1, 50, { at: '2026-03-02T07:56:00Z' });
    expect((await day()).posted.changedAir).toMatchObject([
      { zoneId: zone, name: 'Booth air', then: { celsius: 10, humidity: 50 }, now: { celsius: 13.1, humidity: 50 } },
    ]);
    // What is booked keeps its minutes until somebody plans anew.
    expect(minutes(await flash())).toBe(21);
    await planAndPost();
    expect((await day()).posted.changedAir).toEqual([]);
    // 13.1 C: exp(6013.6 x (1/286.25 - 1/293.15)) = 1.640: 17 min.
    expect(minutes(await flash())).toBe(17);
  });

  test('damp air counts as well, and a posted draft made by hand is right for the air of its day', async () => {
    await takeLatest();
    await read(20, 50);
    await coat();
    const post = async () => {
      const draft = (await desk().post(at('draft')).send({}).expect(200)).body as { version: number };
      await desk().post(at('draft/post')).send({ version: draft.version }).expect(200);
    };
    await post();
    await read(20, 66, { at: '2026-03-02T07:55:00Z' });
    expect((await day()).posted.changedAir).toHaveLength(1);
    await post();
    expect((await day()).posted.changedAir).toEqual([]);
  });

  test('a zone planned by the shop’s default is marked by a reading far from it, once', async () => {
    await coat();
    const draft = (await desk().post(at('draft')).send({}).expect(200)).body as { version: number };
    await desk().post(at('draft/post')).send({ version: draft.version }).expect(200);
    await read(14, 50);
    expect((await day()).posted.changedAir).toMatchObject([{ then: { celsius: 20 }, now: { celsius: 14 } }]);
    const again = (await desk().post(at('draft')).send({}).expect(200)).body as { version: number };
    await desk().post(at('draft/post')).send({ version: again.version }).expect(200);
    expect((await day()).posted.changedAir).toEqual([]);
  });
});
