import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { DayView } from '#contracts/day.ts';
import { inShop, type Trx } from '#server/db/in-shop.ts';
import { benchRoutes } from '#server/http/bench.ts';
import { dayRoutes } from '#server/http/day.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aBooking, aDraft, aJob, aMember, aShop, aWay, type TestShop } from '../helpers/factories-jobs.ts';

let api: TestApi;
let shop: TestShop;
let lead: string;

beforeAll(async () => {
  api = await testApi((routes, deps) => {
    dayRoutes(routes, deps);
    benchRoutes(routes, deps);
  }, '2026-03-02T08:00:00Z');
});
afterAll(() => api.close());
beforeEach(async () => {
  shop = await aShop(api.deps.db);
  lead = await aMember(api.deps.db, shop, { role: 'lead' });
});

const utc = (time: string): Date => new Date(`2026-03-${time}:00Z`);
const inIt = <T>(work: (trx: Trx) => Promise<T>): Promise<T> =>
  inShop(api.deps.db, { shopId: shop.id, accountId: null }, work);
const range = 'from=2026-03-02T05:00:00Z&to=2026-03-02T20:00:00Z';
const day = async (query = range, account = lead): Promise<DayView> =>
  (await api.as(account).get(`/api/shops/${shop.id}/day?${query}`).expect(200)).body as DayView;

const paint = aWay({
  id: 'paint',
  label: 'Sprayed',
  placeKinds: ['booth'],
  phases: [
    { kind: 'spray', minutes: 20, attendance: 'hands' },
    { kind: 'flash', minutes: 10, attendance: 'none' },
  ],
});
const bake = aWay({
  id: 'bake',
  label: 'Booth bake',
  stay: true,
  skill: null,
  gap: { min: 10, max: 60, settle: 10 },
  phases: [{ kind: 'bake', minutes: 40, attendance: 'onsite' }],
});
const polish = aWay({ gap: { min: 30, max: null, settle: 20 } });

/** Painted 08:00 to 08:30, baked on the spot 08:50 to 09:30, polished 10:00 to 11:00 (UTC). */
async function door(promiseAt: Date | null = null) {
  const job = await aJob(api.deps.db, shop, {
    title: 'Door',
    promiseAt,
    parts: [
      { name: 'Door', substrate: 'steel', units: 2 },
      { name: 'Handle', substrate: 'abs', units: 1 },
    ],
    stages: [
      { title: 'Base', ways: [paint] },
      { title: 'Bake', ways: [bake] },
      { title: 'Polish', ways: [polish] },
    ],
  });
  const [base = '', baked = '', polished = ''] = job.stages;
  const place = shop.booth;
  const { db } = api.deps;
  await aBooking(db, shop, {
    stage: base,
    place,
    person: shop.painter,
    way: 'paint',
    from: utc('02T08:00'),
    phases: [20, 10],
  });
  await aBooking(db, shop, { stage: baked, place, way: 'bake', from: utc('02T08:50'), phases: [40] });
  await aBooking(db, shop, { stage: polished, place: shop.prep, person: shop.helper, from: utc('02T10:00') });
  return { job, base, baked, polished };
}

describe('bars', () => {
  test('carry phases, window, chain, and until when the place is held', async () => {
    const { base, baked, polished } = await door(utc('02T10:45'));
    const view = await day();
    expect(view.shown).toBe('posted');
    expect(view.bars.map((bar) => bar.id)).toEqual([base, baked, polished]);
    expect(view.bars[0]).toMatchObject({
      partNames: 'Door, Handle',
      wayLabel: 'Sprayed',
      personName: 'Painter',
      needsHands: true,
      from: '2026-03-02T08:00:00.000Z',
      to: '2026-03-02T08:30:00.000Z',
      // the bake is done where it stands: held until that begins
      heldTo: '2026-03-02T08:50:00.000Z',
      chain: [baked],
      window: { earliest: null, latest: null },
      phases: [
        { kind: 'spray', from: '2026-03-02T08:00:00.000Z', to: '2026-03-02T08:20:00.000Z', attendance: 'hands' },
        { kind: 'flash', from: '2026-03-02T08:20:00.000Z', to: '2026-03-02T08:30:00.000Z', lamp: false },
      ],
      state: 'planned',
      posted: null,
      added: false,
    });
    expect(view.bars[1]).toMatchObject({
      needsHands: false,
      personName: null,
      // 10 to 60 minutes after 08:30
      window: { earliest: '2026-03-02T08:40:00.000Z', latest: '2026-03-02T09:30:00.000Z' },
      // settles for 20 minutes after 09:30
      heldTo: '2026-03-02T09:50:00.000Z',
      chain: [],
    });
    // ends 11:00, promised 10:45: the whole job is late
    expect(view.bars.map((bar) => bar.late)).toEqual([true, true, true]);
  });

  test('are those that touch the range, with windows and lateness from beyond it', async () => {
    const { base, baked, polished } = await door(utc('02T10:45'));
    const only = async (from: string, to: string) =>
      (await day(`from=2026-03-02T${from}:00Z&to=2026-03-02T${to}:00Z`)).bars;
    const bakes = await only('09:00', '09:30');
    expect(bakes.map((bar) => bar.id)).toEqual([baked]);
    expect(bakes[0]).toMatchObject({ late: true, window: { earliest: '2026-03-02T08:40:00.000Z' } });
    expect((await only('11:00', '12:00')).map((bar) => bar.id)).toEqual([]);
    expect((await only('10:59', '12:00')).map((bar) => bar.id)).toEqual([polished]);
    // a place that is only held counts, half-open
    expect((await only('08:30', '08:51')).map((bar) => bar.id)).toEqual([base, baked]);
  });

  test('say what runs and what is done; a done stage moves the window of the next', async () => {
    const { base } = await door();
    const stage = `/api/shops/${shop.id}/stages/${base}`;
    api.setClock('2026-03-02T08:02:00Z');
    await api.as(lead).post(`${stage}/start`).send({ version: 1 }).expect(200);
    expect((await day()).bars.map((bar) => bar.state)).toEqual(['running', 'planned', 'planned']);
    api.setClock('2026-03-02T08:36:00Z');
    await api.as(lead).post(`${stage}/finish`).send({ version: 2 }).expect(200);
    const { bars, seq } = await day();
    expect(bars.map((bar) => bar.state)).toEqual(['done', 'planned', 'planned']);
    expect(bars[1]?.window.earliest).toBe('2026-03-02T08:46:00.000Z');
    expect(seq).toBe(2);
  });
});

describe('a draft', () => {
  test('is shown beside the posted plan: what moved, what is new, what stands', async () => {
    const { db } = api.deps;
    const { base, baked, polished } = await door(utc('02T12:00'));
    const fresh = await aJob(db, shop, { title: 'New one', stages: [{}] });
    const draft = await aDraft(db, shop);
    const book = { draft, place: shop.booth };
    await aBooking(db, shop, {
      ...book,
      stage: base,
      person: shop.painter,
      way: 'paint',
      from: utc('02T08:00'),
      phases: [20, 10],
    });
    await aBooking(db, shop, { ...book, stage: baked, way: 'bake', from: utc('02T08:45'), phases: [40] });
    await aBooking(db, shop, { draft, stage: polished, place: shop.prep, person: shop.painter, from: utc('02T11:30') });
    await aBooking(db, shop, {
      draft,
      stage: fresh.stages[0] ?? '',
      place: shop.prep,
      person: shop.helper,
      from: utc('02T09:00'),
    });
    const view = await day(`${range}&plan=draft`);
    expect(view.shown).toBe('draft');
    expect(view.draft).toMatchObject({ id: draft, version: 1, changes: 3, late: 1, behind: false });
    expect(view.bars.map((bar) => [bar.id, bar.posted, bar.added])).toEqual([
      [base, null, false],
      [baked, { placeId: shop.booth, personId: null, from: '2026-03-02T08:50:00.000Z' }, false],
      [polished, { placeId: shop.prep, personId: shop.helper, from: '2026-03-02T10:00:00.000Z' }, false],
      [fresh.stages[0], null, true],
    ]);
    expect(view.bars[0]?.late).toBe(true);
    const posted = await day();
    expect(posted.bars.map((bar) => bar.id)).toEqual([base, baked, polished]);
    expect(posted.bars[0]?.late).toBe(false);
    expect(posted.draft?.id).toBe(draft);
    expect(posted.unplaced.map((job) => job.jobTitle)).toEqual(['New one']);
    expect(view.unplaced).toEqual([]);
  });

  test('without one the posted plan is shown, and what has begun stands in both', async () => {
    const { db } = api.deps;
    const { base } = await door();
    expect((await day(`${range}&plan=draft`)).shown).toBe('posted');
    await api.as(lead).post(`/api/shops/${shop.id}/stages/${base}/start`).send({ version: 1 }).expect(200);
    await aDraft(db, shop);
    const view = await day(`${range}&plan=draft`);
    expect(view.bars.map((bar) => [bar.id, bar.state, bar.added])).toEqual([[base, 'running', false]]);
    expect(view.draft).toMatchObject({ changes: 2 });
    expect(view.unplaced.map((job) => [job.jobTitle, job.stageTitle])).toEqual([['Door', 'Bake']]);
    await inIt((trx) => trx('shop').where({ id: shop.id }).update({ plan_number: 4 }));
    expect((await day(`${range}&plan=draft`)).draft?.behind).toBe(true);
  });

  test('tells why a job found no room, as the planner last said', async () => {
    const { db } = api.deps;
    const job = await aJob(db, shop, { title: 'Too big', promiseAt: utc('05T10:00') });
    await aJob(db, shop, { title: 'Never asked' });
    expect((await day()).unplaced).toMatchObject([
      { jobTitle: 'Too big', stageTitle: 'Stage 1', reason: null },
      { jobTitle: 'Never asked', reason: null },
    ]);
    await aDraft(db, shop, { unplaced: [{ jobId: job.id, stageId: job.stages[1], reason: 'No room before Friday.' }] });
    expect((await day(`${range}&plan=draft`)).unplaced).toMatchObject([
      { jobTitle: 'Too big', stageTitle: 'Stage 2', reason: 'No room before Friday.' },
      { jobTitle: 'Never asked', reason: null },
    ]);
  });
});

test('rows: places, lamps and people with closures, shifts and absences; reasons only for who plans', async () => {
  await inIt(async (trx) => {
    await trx('closure').insert({
      shop_id: shop.id,
      id: randomUUID(),
      kind: 'maintenance',
      label: 'Filter change',
      place_id: shop.booth,
      starts_local: '2026-02-02T07:00',
      rule: 'FREQ=WEEKLY;BYDAY=MO',
      minutes: 30,
    });
    await trx('absence').insert({
      shop_id: shop.id,
      id: randomUUID(),
      person_id: shop.helper,
      during: '[2026-03-02T07:00:00Z,2026-03-02T11:00:00Z)',
      reason: 'dentist',
    });
    await trx('place')
      .where({ shop_id: shop.id, id: shop.rack })
      .update({ retired_at: utc('01T00:00') });
  });
  const view = await day();
  expect(view.rows.map((row) => [row.kind, row.name])).toEqual([
    ['booth', 'Booth'],
    ['prep', 'Prep'],
    ['lamp', 'Lamp'],
    ['person', 'Painter'],
    ['person', 'Helper'],
  ]);
  expect(view.open).toEqual([{ from: '2026-03-02T06:00:00.000Z', to: '2026-03-02T17:00:00.000Z' }]);
  expect(view.rows[0]?.closed).toEqual([
    { from: '2026-03-02T06:00:00.000Z', to: '2026-03-02T06:30:00.000Z', kind: 'maintenance', label: 'Filter change' },
  ]);
  expect(view.rows[2]).toMatchObject({ kilowatts: 6, circuitId: view.circuits[0]?.id, working: null });
  expect(view.rows[3]?.working).toHaveLength(2);
  expect(view.rows[4]).toMatchObject({
    working: [{ from: '2026-03-02T11:30:00.000Z', to: '2026-03-02T15:30:00.000Z' }],
    closed: [{ kind: 'absence', label: 'dentist' }],
  });
  const painter = await aMember(api.deps.db, shop, { role: 'painter' });
  expect((await day(range, painter)).rows[4]?.closed[0]?.label).toBe('');
});

test('who posted, and how the last run went', async () => {
  await inIt(async (trx) => {
    await trx('posted_plan').insert({
      shop_id: shop.id,
      id: randomUUID(),
      number: 3,
      posted_by: lead,
      posted_at: utc('01T10:00'),
      body: '[]',
    });
    await trx('shop').where({ id: shop.id }).update({ plan_number: 3 });
    await trx('plan_run').insert({
      shop_id: shop.id,
      id: randomUUID(),
      state: 'done',
      scope: 'all',
      seed: 1,
      seconds: 5,
      progress: JSON.stringify({ cost: 12.5, bound: null, evaluations: 40, unplaced: 1 }),
      started_at: utc('02T07:00'),
      finished_at: utc('02T07:01'),
    });
  });
  const view = await day();
  expect(view.posted).toEqual({ number: 3, at: '2026-03-01T10:00:00.000Z', by: 'The lead', changedAir: [] });
  expect(view.run).toMatchObject({ state: 'done', progress: { cost: 12.5 }, finishedAt: '2026-03-02T07:01:00.000Z' });
});

test('an empty, turned round or endless range, and another shop, are refused', async () => {
  const get = (query: string, id = shop.id) => api.as(lead).get(`/api/shops/${id}/day?${query}`);
  await get('from=2026-03-02T00:00:00Z&to=2026-03-02T00:00:00Z').expect(400);
  await get('from=2026-03-02T00:00:00Z&to=2026-05-02T00:00:00Z').expect(400);
  await get('from=2026-03-02').expect(400);
  await get(range, (await aShop(api.deps.db)).id).expect(404);
});
