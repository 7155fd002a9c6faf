import { v7 as uuid } from 'uuid';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { plan } from '#planner/index.ts';
import { inShop } from '#server/db/in-shop.ts';
import { loadFacts } from '#server/planning/facts.ts';
import { buildProblem, frameOf } from '#server/planning/problem/build-problem.ts';
import { signedIn, testApp, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { aBooking, aJob, aShop, aWay, type TestShop } from '../helpers/factories-jobs.ts';
import { makeMember } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
let shop: TestShop;
let owner: Agent;
let lead: Agent;
let at: string;
beforeAll(async () => {
  database = await freshDatabase();
  // Tuesday 10 March 2026, 14:00 in Amsterdam.
  app = await testApp(database);
});
beforeEach(async () => {
  shop = await aShop(app.deps.db);
  owner = await signedIn(app, await makeMember(app.owner, shop, { role: 'owner' }));
  lead = await signedIn(app, await makeMember(app.owner, shop, { role: 'lead' }));
  at = `/api/shops/${shop.id}`;
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

const hours = async () => (await owner.get(`${at}/hours`).expect(200)).body;
const monday = { day: 'MO', from: 480, to: 720 };
const workdays = ['MO', 'TU', 'WE', 'TH', 'FR'].map((day) => ({ day, from: 420, to: 1080 }));
const watched = aWay({ skill: null, phases: [{ kind: 'flash', minutes: 60, attendance: 'onsite' }] });
const booked = async (from: string) => {
  const job = await aJob(app.deps.db, shop, { title: 'Door' });
  const stage = job.stages[0] ?? '';
  await aBooking(app.deps.db, shop, { stage, place: shop.prep, person: shop.painter, from: new Date(from) });
  return { job, stage };
};

describe('the usual week', () => {
  test('is shown as people think of it', async () => {
    expect(await hours()).toMatchObject({
      version: 1,
      timeZone: 'Europe/Amsterdam',
      week: workdays,
      next: null,
      extra: [],
    });
  });

  test('changes from a day on; the past stays as it was, and the hours have one version', async () => {
    const week = [monday, { day: 'SA', from: 480, to: 720 }];
    const body = { version: 1, from: '2026-03-16', week };
    expect((await owner.post(`${at}/week`).send(body).expect(200)).body).toEqual({ version: 2, clashes: [] });
    expect(await hours()).toMatchObject({ version: 2, week: workdays, next: { from: '2026-03-16', week } });
    const rows = await app.owner('opening').where({ shop_id: shop.id }).orderBy('starts_local');
    expect(rows).toMatchObject([
      {
        starts_local: '2026-01-05T07:00',
        rule: 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR;UNTIL=20260315T235959',
        minutes: 660,
      },
      { starts_local: '2026-03-16T08:00', rule: 'FREQ=WEEKLY;BYDAY=MO,SA', minutes: 240 },
    ]);
    const stale = await owner.post(`${at}/week`).send(body).expect(409);
    expect(stale.body.error).toMatchObject({ code: 'stale', current: { version: 2, next: { from: '2026-03-16' } } });
    // The booth day of a day before knows the old hours, one of a day after the new ones.
    const open = async (day: string) => {
      const query = `from=${day}T00:00:00Z&to=${day}T23:00:00Z`;
      return (await owner.get(`${at}/day?${query}`).expect(200)).body.open as { from: string }[];
    };
    expect((await open('2026-03-09'))[0]?.from).toBe('2026-03-09T06:00:00.000Z');
    expect((await open('2026-03-16'))[0]?.from).toBe('2026-03-16T07:00:00.000Z');
  });

  test.each([
    [{ from: '2026-03-09' }, 'body.from'],
    [{ week: [monday, { day: 'MO', from: 600, to: 900 }] }, 'body.week.1'],
    [
      {
        week: [
          { day: 'SU', from: 1320, to: 1920 },
          { day: 'MO', from: 420, to: 600 },
        ],
      },
      'body.week.1',
    ],
    [{ week: [{ day: 'MO', from: 600, to: 600 }] }, 'body.week.0.to'],
  ])('that cannot be is refused: %j', async (more, field) => {
    const answer = await owner
      .post(`${at}/week`)
      .send({ version: 1, from: '2026-03-16', week: [], ...more })
      .expect(400);
    expect(answer.body.error.fields).toMatchObject([{ path: field }]);
    expect((await hours()).version).toBe(1);
  });

  test('that leaves posted work outside tells which; hours beside it let it back in', async () => {
    // A flash is watched over by somebody on the premises; whose shift it is does not matter.
    const job = await aJob(app.deps.db, shop, { stages: [{ ways: [watched] }] });
    const stage = job.stages[0] ?? '';
    await aBooking(app.deps.db, shop, { stage, place: shop.prep, from: new Date('2026-03-18T09:00:00Z') });
    const { body } = await owner
      .post(`${at}/week`)
      .send({ version: 1, from: '2026-03-16', week: [monday] })
      .expect(200);
    expect(body.clashes).toMatchObject([{ stageId: stage, reason: { code: 'nobody-there' } }]);
    const extra = { startsLocal: '2026-03-18T08:00', rule: null, minutes: 540 };
    const added = await owner.post(`${at}/openings`).send(extra).expect(200);
    expect((await hours()).extra).toEqual([{ id: added.body.id, ...extra }]);
    const removed = await owner.delete(`${at}/openings/${added.body.id}`).expect(200);
    expect(removed.body.clashes).toMatchObject([{ stageId: stage }]);
    await owner.delete(`${at}/openings/${added.body.id}`).expect(404);
  });
});

describe('a closure', () => {
  const closure = {
    kind: 'breakdown',
    label: 'Fan',
    placeId: null as string | null,
    lampId: null,
    startsLocal: '2026-03-11T09:00',
    rule: null,
    minutes: 240,
  };
  test('is entered by the lead, and tells which posted work lies in it', async () => {
    const { job, stage } = await booked('2026-03-11T09:00:00Z');
    const { body } = await lead
      .post(`${at}/closures`)
      .send({ ...closure, placeId: shop.prep })
      .expect(200);
    expect(body.closure).toMatchObject({ ...closure, placeId: shop.prep, version: 1 });
    expect(body.clashes).toMatchObject([
      {
        stageId: stage,
        jobNumber: job.number,
        from: '2026-03-11T09:00:00.000Z',
        reason: {
          code: 'place-closed',
          names: ['Prep'],
          at: ['2026-03-11T08:00:00.000Z', '2026-03-11T12:00:00.000Z'],
        },
      },
    ]);
    const day = await lead.get(`${at}/day?from=2026-03-11T00:00:00Z&to=2026-03-11T23:00:00Z`).expect(200);
    const rows = day.body.rows as { id: string; closed: object[] }[];
    expect(rows.find(({ id }) => id === shop.prep)?.closed).toEqual([
      { kind: 'breakdown', label: 'Fan', from: '2026-03-11T08:00:00.000Z', to: '2026-03-11T12:00:00.000Z' },
    ]);
  });

  test('is changed by who has seen it last, and removed', async () => {
    const made = (
      await lead
        .post(`${at}/closures`)
        .send({ ...closure, placeId: shop.booth })
        .expect(200)
    ).body.closure;
    const path = `${at}/closures/${made.id}`;
    const { id: _id, ...fields } = made;
    await lead
      .patch(path)
      .send({ ...fields, minutes: 300 })
      .expect(200);
    const stale = await lead
      .patch(path)
      .send({ ...fields, minutes: 360 })
      .expect(409);
    expect(stale.body.error.current).toMatchObject({ minutes: 300, version: 2 });
    await lead.delete(path).send({ version: 1 }).expect(409);
    await lead.delete(path).send({ version: 2 }).expect(204);
    expect((await hours()).closures).toEqual([]);
  });

  test.each([
    [{ rule: 'FREQ=HOURLY' }, 'body.rule'],
    [{ rule: 'FREQ=DAILY;BYMONTH=2;BYMONTHDAY=30' }, 'body.rule'],
    [{ startsLocal: '2026-02-30T09:00' }, 'body.startsLocal'],
    [{ minutes: 0 }, 'body.minutes'],
    [{ placeId: uuid() }, 'body.placeId'],
    [{ placeId: uuid(), lampId: uuid() }, 'body.lampId'],
  ])('that is wrong is refused by field: %j', async (more, field) => {
    const { body } = await lead
      .post(`${at}/closures`)
      .send({ ...closure, ...more })
      .expect(400);
    expect(body.error.fields).toMatchObject([{ path: field }]);
  });

  test('goes out and comes in as a file, once', async () => {
    const csv =
      'kind,label,of,starts,rule,minutes\n' +
      'holiday,New Year,,2027-01-01,FREQ=YEARLY;BYMONTH=1;BYMONTHDAY=1,1440\n' +
      'maintenance,Clean,Booth,2026-03-13 07:00,FREQ=WEEKLY;INTERVAL=2;BYDAY=FR,120\n';
    const report = await lead.post(`${at}/closures-csv`).send({ csv, tryOnly: false }).expect(200);
    expect(report.body).toEqual({ lines: 2, added: 2, changed: 0, faults: [] });
    const out = (await lead.get(`${at}/closures-csv`).expect(200)).body.csv;
    const again = await lead.post(`${at}/closures-csv`).send({ csv: out, tryOnly: false }).expect(200);
    expect(again.body).toEqual({ lines: 2, added: 0, changed: 0, faults: [] });
    const bad = await lead
      .post(`${at}/closures-csv`)
      .send({ csv: 'kind,of,starts,minutes\nclosure,Nowhere,2026-03-13,60\nclosure,,13.3.2026,60\n', tryOnly: true });
    expect(bad.body.faults).toMatchObject([
      { line: 2, column: 'of' },
      { line: 3, column: 'starts' },
    ]);
  });
});

// What is closed is seen by the planner: the place is closed in the problem that a plan is made from.
describe('the next plan', () => {
  test('keeps clear of a breakdown and of maintenance that comes again', async () => {
    await aJob(app.deps.db, shop, { title: 'Door', stages: [{}] });
    const startOf = async (): Promise<string> => {
      const facts = await inShop(app.deps.db, { shopId: shop.id, accountId: null }, (trx) =>
        loadFacts(trx, shop.id, app.clock.now),
      );
      const built = buildProblem(facts, frameOf(facts), { kind: 'plan', scope: 'all', frozen: new Set() }, facts.now);
      const made = plan(built.problem, { seed: 1, evaluations: 50 });
      const [first] = made.assignments;
      if (!first) throw new Error(JSON.stringify(made.unplaced));
      return built.clock.instant(first.start).toISOString();
    };
    // Now it is 14:00, the painter is in until 16:30: the stage of an hour begins at once.
    expect(await startOf()).toBe('2026-03-10T13:00:00.000Z');
    const prep = { label: '', placeId: shop.prep, lampId: null };
    const fan = { ...prep, kind: 'breakdown', startsLocal: '2026-03-10T14:00', rule: null, minutes: 60 };
    await lead.post(`${at}/closures`).send(fan).expect(200);
    expect(await startOf()).toBe('2026-03-10T14:00:00.000Z');
    const clean = {
      ...prep,
      kind: 'maintenance',
      startsLocal: '2026-02-24T15:00',
      rule: 'FREQ=WEEKLY;INTERVAL=2;BYDAY=TU',
      minutes: 120,
    };
    await lead.post(`${at}/closures`).send(clean).expect(200);
    // Every two weeks on Tuesday from 15 to 17: the rest of the day is gone, and the shift begins at 8 the next day.
    expect(await startOf()).toBe('2026-03-11T07:00:00.000Z');
  });
});
