import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { draftRoutes } from '#server/http/drafts.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aBooking, aJob, aShop, aWay } from '../helpers/factories-jobs.ts';
import { aPlanShop, bonnet, codesOf, draftDesk, movedOf, reasonsOf, spray, utc, type PlanShop } from './drafts-shop.ts';

let api: TestApi;
let shop: PlanShop;
let desk: ReturnType<typeof draftDesk>;
beforeAll(async () => {
  api = await testApi(draftRoutes, '2026-03-02T06:30:00Z');
});
afterAll(() => api.close());
beforeEach(async () => {
  shop = await aPlanShop(api.deps.db);
  desk = draftDesk(api, shop);
});

describe('moving', () => {
  it('takes the bake along that is done on the spot, at the distance it had', async () => {
    const job = await bonnet(api.deps.db, shop);
    const draft = await desk.open();
    const reply = await desk
      .move(job.clear, { version: draft.version, start: utc('02T09:00'), placeId: shop.booth })
      .expect(200);
    expect(reply.body).toMatchObject({ draft: { id: draft.id, version: 2 }, reasons: [] });
    expect(movedOf(reply).moved.map((m) => [m.stageId, m.from, m.to])).toEqual([
      [job.clear, '2026-03-02T09:00:00.000Z', '2026-03-02T09:30:00.000Z'],
      [job.bake, '2026-03-02T09:45:00.000Z', '2026-03-02T10:18:00.000Z'],
    ]);
    expect((await desk.items()).map(({ person_id }) => person_id)).toEqual([shop.painter, null]);
    expect(await desk.changes()).toEqual(['draft-opened', 'draft-changed']);
  });

  it('is refused with the rule that would be broken, and nothing is written', async () => {
    const job = await bonnet(api.deps.db, shop);
    const draft = await desk.open();
    const before = await desk.items();
    const late = await desk
      .move(job.bake, { version: draft.version, start: utc('02T09:31'), placeId: shop.booth })
      .expect(422);
    expect(reasonsOf(late)).toEqual([
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
    const away = await desk
      .move(job.bake, { version: draft.version, start: utc('02T08:45'), placeId: shop.cold })
      .expect(422);
    expect(codesOf(away)).toContain('moved-while-staying');
    const lunch = await desk
      .move(job.clear, { version: draft.version, start: utc('02T10:50'), placeId: shop.booth })
      .expect(422);
    expect(reasonsOf(lunch)).toMatchObject([
      {
        code: 'off-shift',
        rule: 8,
        ids: [shop.painter],
        names: ['Painter'],
        at: ['2026-03-02T10:50:00.000Z', '2026-03-02T11:10:00.000Z'],
      },
    ]);
    expect(await desk.items()).toEqual(before);
    expect(await desk.open()).toEqual(draft);
    expect(await desk.changes()).toEqual(['draft-opened']);
  });

  it('says why where heat is the reason: the booth may not bake', async () => {
    const job = await bonnet(api.deps.db, shop);
    const draft = await desk.open();
    const reply = await desk
      .move(job.clear, { version: draft.version, start: utc('02T08:00'), placeId: shop.cold })
      .expect(422);
    expect(codesOf(reply)).toContain('booth-heat');
  });

  it('answers a dry run with the reasons and writes nothing', async () => {
    const job = await bonnet(api.deps.db, shop);
    const draft = await desk.open();
    const asked = { version: draft.version, placeId: shop.booth, dryRun: true };
    const bad = await desk.move(job.clear, { ...asked, start: utc('02T06:00') }).expect(200);
    expect(movedOf(bad).reasons.map(({ code }) => code)).toContain('before-now');
    const good = await desk.move(job.clear, { ...asked, start: utc('02T09:00') }).expect(200);
    expect(good.body).toMatchObject({ draft, reasons: [], moved: [{}, {}] });
    expect(await desk.open()).toEqual(draft);
  });

  it('to where it is changes nothing', async () => {
    const job = await bonnet(api.deps.db, shop);
    const draft = await desk.open();
    const reply = await desk
      .move(job.clear, { version: draft.version, start: utc('02T08:00'), placeId: shop.booth })
      .expect(200);
    expect(reply.body).toEqual({ draft, reasons: [], moved: [] });
    expect(await desk.changes()).toEqual(['draft-opened']);
  });

  it('of two leads the second is told that the draft has moved on', async () => {
    const job = await bonnet(api.deps.db, shop);
    const draft = await desk.open();
    const body = { version: draft.version, placeId: shop.booth };
    const replies = await Promise.all([
      desk.move(job.clear, { ...body, start: utc('02T09:00') }),
      desk.move(job.clear, { ...body, start: utc('02T09:30') }, shop.other),
    ]);
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
    const stale = replies.find(({ status }) => status === 409);
    expect(stale?.body.error).toMatchObject({ code: 'stale', current: { id: draft.id, version: 2 } });
  });

  it('into what somebody else has is refused; the painter who is busy gives way to one who is free', async () => {
    await bonnet(api.deps.db, shop);
    const second = await bonnetLater();
    const draft = await desk.open();
    const taken = await desk
      .move(second, { version: draft.version, start: utc('02T08:10'), placeId: shop.booth })
      .expect(422);
    expect(codesOf(taken)).toEqual(expect.arrayContaining(['place-taken', 'person-busy']));
    const helper = { skills: ['paint', 'prep'], spray_trained_on: '2025-01-10' };
    await shop.in((trx) => trx('person').where({ shop_id: shop.id, id: shop.helper }).update(helper));
    const free = await desk
      .move(second, { version: draft.version, start: utc('02T08:10'), placeId: shop.cold })
      .expect(200);
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
    const draft = await desk.open();
    const reply = await desk
      .move(stages[0] ?? '', {
        version: draft.version,
        start: utc('02T09:00'),
        placeId: shop.cold,
      })
      .expect(200);
    expect(
      movedOf(reply)
        .moved.map(({ stageId, to }) => [stageId, to])
        .sort(),
    ).toEqual(stages.map((stage) => [stage, '2026-03-02T09:50:00.000Z']).sort());
    expect(new Set((await desk.items()).map(({ load_id }) => load_id)).size).toBe(1);
  });

  it('places a job from the list of those without room', async () => {
    const job = await aJob(api.deps.db, shop, { title: 'Wing', stages: [{ title: 'Clear', ways: [spray] }] });
    const draft = await desk.open();
    const reply = await desk
      .move(job.stages[0] ?? '', {
        version: draft.version,
        start: utc('02T09:00'),
        placeId: shop.booth,
      })
      .expect(200);
    expect(reply.body.moved).toMatchObject([{ personId: shop.painter, to: '2026-03-02T09:30:00.000Z' }]);
  });

  it('pins', async () => {
    const job = await bonnet(api.deps.db, shop);
    const draft = await desk.open();
    await desk
      .move(job.clear, { version: draft.version, start: utc('02T08:00'), placeId: shop.booth, pinned: true })
      .expect(200);
    const pinned = await shop.in((trx) =>
      trx('draft_item').where({ shop_id: shop.id, pinned: true }).pluck('stage_id'),
    );
    expect(pinned).toEqual([job.clear]);
  });

  it('does not let a painter spray whose training has lapsed', async () => {
    const job = await bonnet(api.deps.db, shop);
    await shop.in((trx) =>
      trx('person').where({ shop_id: shop.id, id: shop.painter }).update({ spray_trained_on: '2021-03-02' }),
    );
    const draft = await desk.open();
    // 40 CFR 63.11173: five years. Good through 2 March 2026, not on the 3rd.
    await desk.move(job.clear, { version: draft.version, start: utc('02T09:00'), placeId: shop.booth }).expect(200);
    const lapsed = await desk
      .move(job.clear, {
        version: 2,
        start: utc('03T09:00'),
        placeId: shop.booth,
        personId: shop.painter,
      })
      .expect(422);
    expect(reasonsOf(lapsed)).toMatchObject([{ code: 'training-lapsed', ids: [shop.painter], names: ['Painter'] }]);
  });

  it('does not bake an electric vehicle above its limit', async () => {
    const job = await bonnet(api.deps.db, shop);
    const draft = await desk.open();
    await desk
      .move(job.bake, { version: draft.version, start: utc('02T09:00'), placeId: shop.rack, way: 'air' })
      .expect(200);
    await shop.in((trx) => trx('job').where({ shop_id: shop.id, id: job.id }).update({ electric: true }));
    const hot = await desk
      .move(job.bake, { version: 2, start: utc('02T08:45'), placeId: shop.booth, way: 'bake' })
      .expect(422);
    expect(reasonsOf(hot)).toMatchObject([{ code: 'heat-limit', names: ['Booth bake'] }]);
    expect(reasonsOf(hot)[0]?.minutes[1]).toBe(49);
  });

  it('does not move what has begun', async () => {
    const job = await bonnet(api.deps.db, shop);
    const draft = await desk.open();
    await shop.in(async (trx) => {
      await trx('stage')
        .where({ shop_id: shop.id, id: job.clear })
        .update({ state: 'running', started_at: utc('02T06:20') });
      await trx('booking').where({ shop_id: shop.id, stage_id: job.clear }).update({ state: 'running' });
    });
    const reply = await desk
      .move(job.clear, { version: draft.version, start: utc('02T09:00'), placeId: shop.booth })
      .expect(422);
    expect(reasonsOf(reply)).toMatchObject([{ code: 'already-begun' }]);
  });

  it.each(['stage', 'place', 'person'])('an unknown %s is not found', async (what) => {
    const job = await bonnet(api.deps.db, shop);
    const draft = await desk.open();
    const foreign = await aShop(api.deps.db);
    const body = {
      version: draft.version,
      start: utc('02T09:00'),
      placeId: what === 'place' ? foreign.booth : shop.booth,
    };
    await desk
      .move(what === 'stage' ? randomUUID() : job.clear, {
        ...body,
        ...(what === 'person' && { personId: foreign.painter }),
      })
      .expect(404);
  });
});
