import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { benchRoutes } from '#server/http/bench.ts';
import { draftRoutes } from '#server/http/drafts.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aBooking, aJob, aMember } from '../helpers/factories-jobs.ts';
import { aPlanShop, bake, spray, utc, type PlanShop } from './drafts-shop.ts';

let api: TestApi;
let shop: PlanShop;
let painter: string;
beforeAll(async () => {
  api = await testApi((routes, deps) => {
    draftRoutes(routes, deps);
    benchRoutes(routes, deps);
  }, '2026-03-02T06:30:00Z');
});
afterAll(() => api.close());
beforeEach(async () => {
  api.setClock('2026-03-02T06:30:00Z');
  shop = await aPlanShop(api.deps.db);
  painter = await aMember(api.deps.db, shop, { role: 'painter', personId: shop.painter });
});

const url = (path = ''): string => `/api/shops/${shop.id}/draft${path}`;
const open = async () =>
  (await api.as(shop.lead).post(url()).send({}).expect(200)).body as { id: string; version: number };
const move = async (stage: string, version: number, start: Date, placeId = shop.booth) =>
  api
    .as(shop.lead)
    .post(url(`/stages/${stage}/move`))
    .send({ version, start, placeId })
    .expect(200);
const post = (version: number, account = shop.lead) => api.as(account).post(url('/post')).send({ version });
const tap = (stage: string, what: 'start' | 'finish', version: number) =>
  api.as(painter).post(`/api/shops/${shop.id}/stages/${stage}/${what}`).send({ version }).expect(200);
const rows = (table: string): Promise<Record<string, unknown>[]> =>
  shop.in((trx) => trx(table).where({ shop_id: shop.id }).select('*')) as Promise<Record<string, unknown>[]>;
const hour = (instant: Date): string => instant.toISOString().slice(11, 16);
const spans = async (column: string): Promise<string[]> => {
  const taken = (await shop.in((trx) =>
    trx('occupancy')
      .where({ shop_id: shop.id })
      .whereNotNull(column)
      .orderByRaw('lower(during)')
      .select(trx.raw('lower(during) as "from", upper(during) as "to"')),
  )) as unknown as { from: Date; to: Date }[];
  return taken.map(({ from, to }) => `${hour(from)}-${hour(to)}`);
};

async function bonnet(title = 'Bonnet', from = utc('02T08:00')) {
  const job = await aJob(api.deps.db, shop, {
    title,
    stages: [
      { title: 'Clear', ways: [spray] },
      { title: 'Bake', ways: [bake] },
    ],
  });
  const [clear = '', baked = ''] = job.stages;
  await aBooking(api.deps.db, shop, {
    stage: clear,
    place: shop.booth,
    person: shop.painter,
    from,
    way: 'spray',
    phases: [20, 10],
  });
  const after = new Date(from.getTime() + 45 * 60_000);
  await aBooking(api.deps.db, shop, { stage: baked, place: shop.booth, from: after, way: 'bake', phases: [3, 30] });
  return { ...job, clear, bake: baked };
}

describe('posting', () => {
  it('makes the draft the plan: bookings, what they take, history and one letter for each whose work changes', async () => {
    const job = await bonnet();
    const wing = await aJob(api.deps.db, shop, { title: 'Wing', stages: [{ title: 'Clear', ways: [spray] }] });
    const draft = await open();
    await move(job.clear, draft.version, utc('02T09:00'));
    await move(wing.stages[0] ?? '', 2, utc('02T13:00'));
    const reply = await post(3).expect(200);
    expect(reply.body).toEqual({ planNumber: 1, changed: 3, letters: 1 });

    expect(await spans('place_id')).toEqual(['09:00-09:45', '09:45-10:18', '13:00-13:30']);
    expect(await spans('person_id')).toEqual(['09:00-09:20', '13:00-13:20']);
    const bookings = await rows('booking');
    expect(bookings.map(({ state, plan_number }) => [state, plan_number])).toEqual([
      ['planned', 1],
      ['planned', 1],
      ['planned', 1],
    ]);
    const [plan] = await rows('posted_plan');
    expect(plan).toMatchObject({ number: 1, posted_by: shop.lead });
    expect((plan?.['body'] as { bookings: unknown[] }).bookings).toHaveLength(3);
    const [letter] = await rows('letter');
    expect(letter).toMatchObject({
      kind: 'plan-changed',
      account_id: painter,
      subject_id: shop.painter,
      subject_version: 1,
      state: 'queued',
    });
    expect((letter?.['data'] as { changes: unknown[] }).changes).toMatchObject([
      {
        kind: 'moved',
        stageTitle: 'Clear',
        from: { startsAt: '2026-03-02T08:00:00.000Z' },
        to: { placeName: 'Booth', startsAt: '2026-03-02T09:00:00.000Z' },
      },
      { kind: 'planned', jobTitle: 'Wing', from: null },
    ]);
    expect(await rows('task')).toMatchObject([{ kind: 'send-letter', key: letter?.['id'] }]);
    expect((await rows('draft')).map(({ state }) => state)).toEqual(['posted']);
    expect((await rows('change')).map(({ kind }) => kind)).toContain('plan-posted');
  });

  it('an unchanged booking stays itself, a changed one counts its version up, one taken off is cancelled', async () => {
    const kept = await bonnet();
    const moved = await bonnet('Door', utc('02T13:00'));
    const before = new Map((await rows('booking')).map((b) => [b['stage_id'], b]));
    const draft = await open();
    await move(moved.clear, draft.version, utc('02T13:30'));
    await shop.in((trx) => trx('draft_item').where({ shop_id: shop.id, stage_id: moved.bake }).delete());
    await post(2).expect(200);
    const after = await rows('booking');
    expect(after.find((b) => b['stage_id'] === kept.clear)).toEqual(before.get(kept.clear));
    const door = after.filter((b) => b['stage_id'] === moved.clear);
    expect(door).toMatchObject([{ id: before.get(moved.clear)?.['id'], version: 2, state: 'planned' }]);
    expect(after.find((b) => b['stage_id'] === moved.bake)).toMatchObject({ state: 'cancelled' });
    expect(await spans('place_id')).toEqual(['08:00-08:45', '08:45-09:18', '13:30-14:00']);
  });

  it('of two at the same moment one wins, and nobody gets two letters', async () => {
    const job = await bonnet();
    const draft = await open();
    await move(job.clear, draft.version, utc('02T09:00'));
    const replies = await Promise.all([post(2), post(2, shop.other), post(2), post(2, shop.other)]);
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409, 409, 409]);
    expect(await rows('posted_plan')).toHaveLength(1);
    expect(await rows('letter')).toHaveLength(1);
    expect(replies.find(({ status }) => status === 409)?.body.error).toMatchObject({ code: 'stale', current: null });
  });

  it('is refused where the draft breaks a rule: a breakdown since, nothing is written', async () => {
    const job = await bonnet();
    const draft = await open();
    await move(job.clear, draft.version, utc('02T09:00'));
    const closure = {
      shop_id: shop.id,
      id: randomUUID(),
      kind: 'breakdown',
      place_id: shop.booth,
      starts_local: '2026-03-02T09:30',
      minutes: 120,
    };
    await shop.in((trx) => trx('closure').insert(closure));
    const compared = await api.as(shop.lead).get(url('/compare')).expect(200);
    const reply = await post(2).expect(422);
    expect(reply.body.error.reasons).toMatchObject([
      { code: 'place-closed', rule: 7, names: ['Booth'], at: ['2026-03-02T08:30:00.000Z', '2026-03-02T10:30:00.000Z'] },
      { code: 'place-closed', stageId: job.bake },
    ]);
    expect(compared.body.reasons).toEqual(reply.body.error.reasons);
    expect(await rows('posted_plan')).toEqual([]);
    expect(await spans('place_id')).toEqual(['08:00-08:30', '08:45-09:18']);
  });

  it('is refused where the ground has shifted, and says what has changed', async () => {
    const job = await bonnet();
    const draft = await open();
    await move(job.clear, draft.version, utc('02T09:00'));
    await tap(job.clear, 'start', 1);
    const begun = await post(2).expect(409);
    expect(begun.body.error).toMatchObject({
      code: 'ground-shifted',
      current: { begun: [{ stageId: job.clear, title: 'Bonnet: Clear', state: 'running' }] },
    });
    await shop.in((trx) =>
      trx('place')
        .where({ shop_id: shop.id, id: shop.booth })
        .update({ retired_at: utc('02T06:00') }),
    );
    await shop.in((trx) => trx('shop').where({ id: shop.id }).update({ plan_number: 4 }));
    const more = await post(2).expect(409);
    expect(more.body.error.current).toMatchObject({ planNumber: 4, retired: [{ id: shop.booth, name: 'Booth' }] });
    expect(await rows('posted_plan')).toEqual([]);
  });

  it('what began late is kept as it runs, and what comes after is held against that', async () => {
    const job = await bonnet();
    const door = await bonnet('Door', utc('02T13:00'));
    const draft = await open();
    api.setClock('2026-03-02T08:10:00Z');
    await tap(job.clear, 'start', 1);
    await move(door.clear, draft.version, utc('02T13:30'));
    // Sprayed 08:10 to 08:40, the bake at 08:45 comes too soon now.
    const reply = await post(2).expect(422);
    expect(reply.body.error.reasons).toMatchObject([{ code: 'too-soon', stageId: job.bake, minutes: [5, 10] }]);
    await move(job.bake, 2, utc('02T08:55'));
    await post(3).expect(200);
    expect(await spans('place_id')).toEqual([
      '08:00-08:10',
      '08:10-08:55',
      '08:55-09:28',
      '13:30-14:15',
      '14:15-14:48',
    ]);
  });

  it('nobody tapped, the time is past: left where it is, it does not stop a plan from being posted', async () => {
    await bonnet();
    const door = await bonnet('Door', utc('02T13:00'));
    const draft = await open();
    api.setClock('2026-03-02T09:30:00Z');
    await move(door.clear, draft.version, utc('02T13:30'));
    await post(2).expect(200);
  });

  it('while a painter taps start: either order, never both, never an error', async () => {
    for (let round = 0; round < 5; round++) {
      shop = await aPlanShop(api.deps.db);
      painter = await aMember(api.deps.db, shop, { role: 'painter', personId: shop.painter });
      const job = await bonnet();
      const draft = await open();
      await move(job.clear, draft.version, utc('02T09:00'));
      const [posted, tapped] = await Promise.all([
        post(2),
        api.as(painter).post(`/api/shops/${shop.id}/stages/${job.clear}/start`).send({ version: 1 }),
      ]);
      expect([200, 409]).toContain(posted.status);
      expect(tapped.status).toBe(200);
      const [stage] = (await rows('stage')).filter(({ id }) => id === job.clear);
      const [booking] = (await rows('booking')).filter((b) => b['stage_id'] === job.clear);
      expect([stage?.['state'], booking?.['state']]).toEqual(['running', 'running']);
      expect(await rows('posted_plan')).toHaveLength(posted.status === 200 ? 1 : 0);
    }
  });
});
