import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { draftRoutes } from '#server/http/drafts.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aBooking, aJob, aMember, aShop, aWay } from '../helpers/factories-jobs.ts';
import { aPlanShop, air, bake, spray, utc, type PlanShop } from './drafts-shop.ts';

let api: TestApi;
let shop: PlanShop;
beforeAll(async () => {
  api = await testApi(draftRoutes, '2026-03-02T06:30:00Z');
});
afterAll(() => api.close());
beforeEach(async () => {
  api.setClock('2026-03-02T06:30:00Z');
  shop = await aPlanShop(api.deps.db);
});

const url = (path = ''): string => `/api/shops/${shop.id}/draft${path}`;
const open = async (account = shop.lead) =>
  (await api.as(account).post(url()).send({}).expect(200)).body as { id: string; version: number };
const move = (stage: string, body: object, account = shop.lead) =>
  api
    .as(account)
    .post(url(`/stages/${stage}/move`))
    .send(body);
const items = () =>
  shop.in((trx) =>
    trx('draft_item')
      .where({ shop_id: shop.id })
      .orderByRaw('lower(during)')
      .select(
        'stage_id',
        'place_id',
        'person_id',
        'load_id',
        'phases',
        trx.raw('lower(during) as "from"'),
        trx.raw('upper(during) as "to"'),
      ),
  ) as Promise<Record<string, unknown>[]>;
const changes = async (): Promise<string[]> =>
  (
    (await shop.in((trx) => trx('change').where({ shop_id: shop.id }).orderBy('seq').select('kind'))) as {
      kind: string;
    }[]
  ).map(({ kind }) => kind);

/** Sprayed 08:00 to 08:30 and baked on the spot 08:45 to 09:18 (UTC), posted. */
async function bonnet(given: { load?: string; title?: string } = {}) {
  const job = await aJob(api.deps.db, shop, {
    title: given.title ?? 'Bonnet',
    stages: [
      { title: 'Clear', ways: [spray] },
      { title: 'Bake', ways: [bake, air] },
    ],
  });
  const [first = '', second = ''] = job.stages;
  await aBooking(api.deps.db, shop, {
    stage: first,
    place: shop.booth,
    person: shop.painter,
    from: utc('02T08:00'),
    way: 'spray',
    phases: [20, 10],
  });
  await aBooking(api.deps.db, shop, {
    stage: second,
    place: shop.booth,
    from: utc('02T08:45'),
    way: 'bake',
    phases: [3, 30],
  });
  return { ...job, clear: first, bake: second };
}

describe('opening', () => {
  it('copies the posted plan, and is the same draft for everybody', async () => {
    const job = await bonnet();
    const [one, two] = await Promise.all([open(), open(shop.other)]);
    expect(two).toEqual(one);
    expect((await items()).map(({ stage_id }) => stage_id)).toEqual([job.clear, job.bake]);
    expect(await changes()).toEqual(['draft-opened']);
  });

  it('is for leads and owners; who does not belong to the shop learns nothing', async () => {
    const painter = await aMember(api.deps.db, shop, { role: 'painter' });
    await api.as(painter).post(url()).send({}).expect(403);
    const elsewhere = await aMember(api.deps.db, await aShop(api.deps.db), { role: 'owner' });
    await api.as(elsewhere).post(url()).send({}).expect(404);
  });
});

describe('moving', () => {
  it('takes the bake along that is done on the spot, at the distance it had', async () => {
    const job = await bonnet();
    const draft = await open();
    const reply = await move(job.clear, { version: draft.version, start: utc('02T09:00'), placeId: shop.booth }).expect(
      200,
    );
    expect(reply.body).toMatchObject({ draft: { id: draft.id, version: 2 }, reasons: [] });
    expect(
      reply.body.moved.map((m: { stageId: string; from: string; to: string }) => [m.stageId, m.from, m.to]),
    ).toEqual([
      [job.clear, '2026-03-02T09:00:00.000Z', '2026-03-02T09:30:00.000Z'],
      [job.bake, '2026-03-02T09:45:00.000Z', '2026-03-02T10:18:00.000Z'],
    ]);
    expect((await items()).map(({ person_id }) => person_id)).toEqual([shop.painter, null]);
    expect(await changes()).toEqual(['draft-opened', 'draft-changed']);
  });

  it('is refused with the rule that would be broken, and nothing is written', async () => {
    const job = await bonnet();
    const draft = await open();
    const before = await items();
    const late = await move(job.bake, { version: draft.version, start: utc('02T09:31'), placeId: shop.booth }).expect(
      422,
    );
    expect(late.body.error.reasons).toEqual([
      {
        code: 'too-late',
        rule: 2,
        stageId: job.bake,
        ids: [job.clear],
        names: ['Bonnet: Clear'],
        at: [],
        minutes: [61, 60],
      },
    ]);
    const away = await move(job.bake, { version: draft.version, start: utc('02T08:45'), placeId: shop.cold }).expect(
      422,
    );
    expect(away.body.error.reasons.map(({ code }: { code: string }) => code)).toContain('moved-while-staying');
    const lunch = await move(job.clear, { version: draft.version, start: utc('02T10:50'), placeId: shop.booth }).expect(
      422,
    );
    expect(lunch.body.error.reasons).toMatchObject([
      {
        code: 'off-shift',
        rule: 8,
        ids: [shop.painter],
        names: ['Painter'],
        at: ['2026-03-02T10:50:00.000Z', '2026-03-02T11:10:00.000Z'],
      },
    ]);
    expect(await items()).toEqual(before);
    expect(await open()).toEqual(draft);
    expect(await changes()).toEqual(['draft-opened']);
  });

  it('says why where heat is the reason: the booth may not bake', async () => {
    const job = await bonnet();
    const draft = await open();
    const reply = await move(job.clear, { version: draft.version, start: utc('02T08:00'), placeId: shop.cold }).expect(
      422,
    );
    expect(reply.body.error.reasons.map(({ code }: { code: string }) => code)).toContain('booth-heat');
  });

  it('answers a dry run with the reasons and writes nothing', async () => {
    const job = await bonnet();
    const draft = await open();
    const asked = { version: draft.version, placeId: shop.booth, dryRun: true };
    const bad = await move(job.clear, { ...asked, start: utc('02T06:00') }).expect(200);
    expect(bad.body.reasons.map(({ code }: { code: string }) => code)).toContain('before-now');
    const good = await move(job.clear, { ...asked, start: utc('02T09:00') }).expect(200);
    expect(good.body).toMatchObject({ draft, reasons: [], moved: [{}, {}] });
    expect(await open()).toEqual(draft);
  });

  it('to where it is changes nothing', async () => {
    const job = await bonnet();
    const draft = await open();
    const reply = await move(job.clear, { version: draft.version, start: utc('02T08:00'), placeId: shop.booth }).expect(
      200,
    );
    expect(reply.body).toEqual({ draft, reasons: [], moved: [] });
    expect(await changes()).toEqual(['draft-opened']);
  });

  it('of two leads the second is told that the draft has moved on', async () => {
    const job = await bonnet();
    const draft = await open();
    const body = { version: draft.version, placeId: shop.booth };
    const replies = await Promise.all([
      move(job.clear, { ...body, start: utc('02T09:00') }),
      move(job.clear, { ...body, start: utc('02T09:30') }, shop.other),
    ]);
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
    const stale = replies.find(({ status }) => status === 409);
    expect(stale?.body.error).toMatchObject({ code: 'stale', current: { id: draft.id, version: 2 } });
  });

  it('into what somebody else has is refused; the painter who is busy gives way to one who is free', async () => {
    await bonnet();
    const second = await bonnetLater();
    const draft = await open();
    const taken = await move(second, { version: draft.version, start: utc('02T08:10'), placeId: shop.booth }).expect(
      422,
    );
    expect(taken.body.error.reasons.map(({ code }: { code: string }) => code)).toEqual(
      expect.arrayContaining(['place-taken', 'person-busy']),
    );
    const helper = { skills: ['paint', 'prep'], spray_trained_on: '2025-01-10' };
    await shop.in((trx) => trx('person').where({ shop_id: shop.id, id: shop.helper }).update(helper));
    const free = await move(second, { version: draft.version, start: utc('02T08:10'), placeId: shop.cold }).expect(200);
    expect(free.body.moved).toMatchObject([{ personId: shop.helper, placeId: shop.cold }]);
  });

  async function bonnetLater(): Promise<string> {
    const job = await aJob(api.deps.db, shop, { title: 'Door', stages: [{ title: 'Primer', ways: [spray] }] });
    const [stage = ''] = job.stages;
    await aBooking(api.deps.db, shop, {
      stage,
      place: shop.booth,
      person: shop.painter,
      from: utc('02T13:00'),
      way: 'spray',
      phases: [20, 10],
    });
    return stage;
  }

  it('moves a load whole', async () => {
    const shared = aWay({ ...spray, load: 'clear' });
    const load = randomUUID();
    const stages: string[] = [];
    for (const title of ['Left', 'Right']) {
      const job = await aJob(api.deps.db, shop, { title, stages: [{ ways: [shared] }] });
      const [stage = ''] = job.stages;
      stages.push(stage);
      await aBooking(api.deps.db, shop, {
        stage,
        place: shop.booth,
        person: shop.painter,
        from: utc('02T08:00'),
        way: 'spray',
        phases: [40, 10],
        load,
      });
    }
    const draft = await open();
    const reply = await move(stages[0] ?? '', {
      version: draft.version,
      start: utc('02T09:00'),
      placeId: shop.cold,
    }).expect(200);
    expect(reply.body.moved.map(({ stageId, to }: { stageId: string; to: string }) => [stageId, to]).sort()).toEqual(
      stages.map((stage) => [stage, '2026-03-02T09:50:00.000Z']).sort(),
    );
    expect(new Set((await items()).map(({ load_id }) => load_id)).size).toBe(1);
  });

  it('places a job from the list of those without room', async () => {
    const job = await aJob(api.deps.db, shop, { title: 'Wing', stages: [{ title: 'Clear', ways: [spray] }] });
    const draft = await open();
    const reply = await move(job.stages[0] ?? '', {
      version: draft.version,
      start: utc('02T09:00'),
      placeId: shop.booth,
    }).expect(200);
    expect(reply.body.moved).toMatchObject([{ personId: shop.painter, to: '2026-03-02T09:30:00.000Z' }]);
  });

  it('pins', async () => {
    const job = await bonnet();
    const draft = await open();
    await move(job.clear, { version: draft.version, start: utc('02T08:00'), placeId: shop.booth, pinned: true }).expect(
      200,
    );
    const pinned = await shop.in((trx) =>
      trx('draft_item').where({ shop_id: shop.id, pinned: true }).pluck('stage_id'),
    );
    expect(pinned).toEqual([job.clear]);
  });

  it('does not let a painter spray whose training has lapsed', async () => {
    const job = await bonnet();
    await shop.in((trx) =>
      trx('person').where({ shop_id: shop.id, id: shop.painter }).update({ spray_trained_on: '2021-03-02' }),
    );
    const draft = await open();
    // 40 CFR 63.11173: five years. Good through 2 March 2026, not on the 3rd.
    await move(job.clear, { version: draft.version, start: utc('02T09:00'), placeId: shop.booth }).expect(200);
    const lapsed = await move(job.clear, {
      version: 2,
      start: utc('03T09:00'),
      placeId: shop.booth,
      personId: shop.painter,
    }).expect(422);
    expect(lapsed.body.error.reasons).toMatchObject([
      { code: 'training-lapsed', ids: [shop.painter], names: ['Painter'] },
    ]);
  });

  it('does not bake an electric vehicle above its limit', async () => {
    const job = await bonnet();
    const draft = await open();
    await move(job.bake, { version: draft.version, start: utc('02T09:00'), placeId: shop.rack, way: 'air' }).expect(
      200,
    );
    await shop.in((trx) => trx('job').where({ shop_id: shop.id, id: job.id }).update({ electric: true }));
    const hot = await move(job.bake, { version: 2, start: utc('02T08:45'), placeId: shop.booth, way: 'bake' }).expect(
      422,
    );
    expect(hot.body.error.reasons).toMatchObject([{ code: 'heat-limit', names: ['Booth bake'] }]);
    expect(hot.body.error.reasons[0].minutes[1]).toBeCloseTo(48.889, 3);
  });

  it('does not move what has begun', async () => {
    const job = await bonnet();
    const draft = await open();
    await shop.in(async (trx) => {
      await trx('stage')
        .where({ shop_id: shop.id, id: job.clear })
        .update({ state: 'running', started_at: utc('02T06:20') });
      await trx('booking').where({ shop_id: shop.id, stage_id: job.clear }).update({ state: 'running' });
    });
    const reply = await move(job.clear, { version: draft.version, start: utc('02T09:00'), placeId: shop.booth }).expect(
      422,
    );
    expect(reply.body.error.reasons).toMatchObject([{ code: 'already-begun' }]);
  });

  it.each(['stage', 'place', 'person'])('an unknown %s is not found', async (what) => {
    const job = await bonnet();
    const draft = await open();
    const foreign = await aShop(api.deps.db);
    const body = {
      version: draft.version,
      start: utc('02T09:00'),
      placeId: what === 'place' ? foreign.booth : shop.booth,
    };
    await move(what === 'stage' ? randomUUID() : job.clear, {
      ...body,
      ...(what === 'person' && { personId: foreign.painter }),
    }).expect(404);
  });
});

describe('comparing and dropping', () => {
  it('tells what moves, whose promise turns late and who hears of it', async () => {
    const job = await bonnet();
    await aMember(api.deps.db, shop, { role: 'painter', personId: shop.painter });
    await shop.in((trx) =>
      trx('job')
        .where({ shop_id: shop.id, id: job.id })
        .update({ promise_at: utc('02T10:00') }),
    );
    const draft = await open();
    await move(job.clear, { version: draft.version, start: utc('02T09:00'), placeId: shop.booth }).expect(200);
    const { body } = await api.as(shop.lead).get(url('/compare')).expect(200);
    expect(body.moved).toHaveLength(2);
    expect(body.moved[0]).toMatchObject({
      stageTitle: 'Clear',
      before: { from: '2026-03-02T08:00:00.000Z', personName: 'Painter' },
      after: { from: '2026-03-02T09:00:00.000Z' },
    });
    expect(body).toMatchObject({
      newlyLate: [{ jobId: job.id, endsAt: '2026-03-02T10:18:00.000Z' }],
      saved: [],
      told: ['Painter'],
      reasons: [],
    });
  });

  it('drops the draft in the version seen, and once is enough', async () => {
    await bonnet();
    const draft = await open();
    await api.as(shop.lead).post(url('/drop')).send({ version: 7 }).expect(409);
    await api.as(shop.lead).post(url('/drop')).send({ version: draft.version }).expect(204);
    await api.as(shop.lead).post(url('/drop')).send({ version: draft.version }).expect(204);
    await api.as(shop.lead).get(url('/compare')).expect(404);
    expect((await open()).id).not.toBe(draft.id);
  });
});
