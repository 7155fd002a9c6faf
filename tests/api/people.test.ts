import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { ErrorReply } from '#contracts/reasons.ts';
import type { Person, Shift } from '#contracts/people.ts';
import { signedIn, testApp, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { aBooking, aJob, aShop, type TestShop } from '../helpers/factories-jobs.ts';
import { makeMember, type MadeMember } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
let shop: TestShop;
let owner: MadeMember;
let agent: Agent;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
});
beforeEach(async () => {
  // Tuesday 2026-03-10, 14:00 in Amsterdam.
  shop = await aShop(app.deps.db);
  owner = await makeMember(app.owner, shop, { role: 'owner', name: 'Olive' });
  agent = await signedIn(app, owner);
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

const at = (more = '') => `/api/shops/${shop.id}/people${more}`;
const early: Shift = {
  startsLocal: '2026-03-09T07:00',
  rule: 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR',
  minutes: 510,
  breaks: [{ after: 150, minutes: 15 }],
};
const fresh = { name: 'Tavi', skills: ['paint'], sprayTrainedOn: null, shifts: [early], memberId: null };
const roster = async () => (await agent.get(at()).expect(200)).body as { people: Person[]; skills: string[] };
const painter = async (): Promise<Person> =>
  (await roster()).people.find(({ id }) => id === shop.painter) ?? expect.fail('no painter');
const changes = () => app.owner('change').where({ shop_id: shop.id, kind: 'people-changed' }).orderBy('seq');

/** Posted for the painter's hands the whole time, from and to by the clock of Amsterdam (UTC+1 until 29 March). */
async function booked(from: string, to: string): Promise<{ jobId: string; stageId: string }> {
  const job = await aJob(app.deps.db, shop);
  const stageId = job.stages[0] ?? '';
  const span = [new Date(`${from}+01:00`), new Date(`${to}+01:00`)] as const;
  const minutes = (span[1].getTime() - span[0].getTime()) / 60_000;
  const id = await aBooking(app.deps.db, shop, {
    stage: stageId,
    place: shop.prep,
    person: shop.painter,
    from: span[0],
    phases: [minutes],
  });
  await app.owner('occupancy').insert({
    shop_id: shop.id,
    id: stageId,
    booking_id: id,
    load_id: stageId,
    person_id: shop.painter,
    during: `[${span[0].toISOString()},${span[1].toISOString()})`,
  });
  return { jobId: job.id, stageId };
}

describe('somebody new', () => {
  test('is on the roster with hours, skills and account, and is on record', async () => {
    const { body } = await agent
      .post(at())
      .send({ ...fresh, skills: ['Paint', 'paint ', 'prep'], memberId: owner.memberId })
      .expect(200);
    expect(body).toMatchObject({
      clashes: [],
      person: { name: 'Tavi', skills: ['paint', 'prep'], version: 1, shifts: [early], member: { name: 'Olive' } },
    });
    expect((await roster()).people.map(({ name }) => name)).toEqual(['Painter', 'Helper', 'Tavi']);
    expect(await changes()).toMatchObject([{ account_id: owner.accountId, ids: [body.person.id] }]);
  });

  test('is made once, however often the request comes', async () => {
    const send = () => agent.post(at()).set('Idempotency-Key', 'tavi-comes-once').send(fresh).expect(200);
    expect((await send()).body).toEqual((await send()).body);
    expect((await roster()).people).toHaveLength(3);
  });

  test.each([
    [{ name: ' ' }, 'body.name'],
    [{ skills: ['a,b'] }, 'body.skills.0'],
    [{ sprayTrainedOn: '2026-02-30' }, 'body.sprayTrainedOn'],
    [{ shifts: [{ ...early, rule: 'FREQ=HOURLY' }] }, 'body.shifts.0.rule'],
    [{ shifts: [{ ...early, breaks: [{ after: 500, minutes: 30 }] }] }, 'body.shifts.0.breaks'],
    [{ shifts: [{ ...early, minutes: 0 }] }, 'body.shifts.0.minutes'],
    [{ memberId: '0190a0a0-0000-7000-8000-00000000dead' }, 'body.memberId'],
  ])('with %j is refused by its field, and nobody is added', async (wrong, path) => {
    const { body } = await agent
      .post(at())
      .send({ ...fresh, ...wrong })
      .expect(400);
    expect((body as ErrorReply).error.fields?.map((field) => field.path)).toContain(path);
    expect((await roster()).people).toHaveLength(2);
  });
});

describe('a change', () => {
  test('counts the version up once and says what it was before', async () => {
    const { version } = await painter();
    const send = () =>
      agent.patch(at(`/${shop.painter}`)).send({ version, name: 'Orlin', skills: ['paint', 'polish'] });
    expect((await send().expect(200)).body.person).toMatchObject({ version: version + 1, name: 'Orlin' });
    await send().expect(200);
    expect((await painter()).version).toBe(version + 1);
    expect(await changes()).toMatchObject([
      { detail: { before: { name: 'Painter', skills: ['paint', 'prep'] }, after: { name: 'Orlin' } } },
    ]);
  });

  test('over somebody else’s is refused with how it stands', async () => {
    await agent
      .patch(at(`/${shop.painter}`))
      .send({ version: 1, name: 'Orlin' })
      .expect(200);
    const { body } = await agent
      .patch(at(`/${shop.painter}`))
      .send({ version: 1, name: 'Brisa' })
      .expect(409);
    expect(body.error).toMatchObject({ code: 'stale', current: { name: 'Orlin', version: 2 } });
  });

  test('of hours tells the posted work that no longer fits, and moves none', async () => {
    const { jobId, stageId } = await booked('2026-03-11T14:00', '2026-03-11T15:00');
    const shifts = [{ ...early, minutes: 300 }];
    const { body } = await agent
      .patch(at(`/${shop.painter}`))
      .send({ version: 1, shifts })
      .expect(200);
    expect(body.clashes).toMatchObject([{ jobId, stageId, from: '2026-03-11T13:00:00.000Z' }]);
    expect(await app.owner('booking').where({ shop_id: shop.id })).toMatchObject([{ state: 'planned' }]);
  });

  test('ties an account to one person, and one person to an account', async () => {
    const memberId = owner.memberId;
    await agent
      .patch(at(`/${shop.helper}`))
      .send({ version: 1, memberId })
      .expect(200);
    await agent
      .patch(at(`/${shop.painter}`))
      .send({ version: 1, memberId })
      .expect(200);
    const { people } = await roster();
    expect(people.map(({ member }) => member?.id ?? null)).toEqual([memberId, null]);
  });
});

// 40 CFR 63.11173(g): every five years; 90 days of warning are the product's own.
describe('spray training', () => {
  test.each([
    ['2021-06-08', 'ends-soon', '2026-06-08', 90],
    ['2021-06-09', 'good', '2026-06-09', 91],
    ['2021-03-10', 'ends-soon', '2026-03-10', 0],
    ['2021-03-09', 'lapsed', '2026-03-09', -1],
    ['2020-02-29', 'lapsed', '2025-02-28', -375],
    ['2026-03-11', 'not-yet', null, null],
    [null, 'never-trained', null, null],
  ])('of %s is %s on 10 March 2026', async (sprayTrainedOn, standing, goodThrough, daysLeft) => {
    await agent
      .patch(at(`/${shop.helper}`))
      .send({ version: 1, sprayTrainedOn: '2026-01-01' })
      .expect(200);
    const { body } = await agent
      .patch(at(`/${shop.helper}`))
      .send({ version: 2, sprayTrainedOn })
      .expect(200);
    expect(body.person.training).toEqual({ standing, goodThrough, daysLeft });
  });
});

describe('an absence', () => {
  const away = { from: '2026-03-11T08:00:00Z', to: '2026-03-12T16:00:00Z', reason: 'dentist' };
  test('over posted work is allowed and tells it; a second time it is the same one', async () => {
    const { stageId } = await booked('2026-03-11T14:00', '2026-03-11T15:00');
    const { body } = await agent
      .post(at(`/${shop.painter}/absences`))
      .send(away)
      .expect(200);
    expect(body.clashes).toMatchObject([{ stageId }]);
    expect(body.person.absences).toMatchObject([
      { reason: 'dentist', from: '2026-03-11T08:00:00.000Z', to: '2026-03-12T16:00:00.000Z' },
    ]);
    const again = await agent
      .post(at(`/${shop.painter}/absences`))
      .send(away)
      .expect(200);
    expect(again.body.person.absences).toHaveLength(1);
    expect(JSON.stringify(await changes())).not.toContain('dentist');
  });

  test('is taken back, once', async () => {
    const { body } = await agent
      .post(at(`/${shop.painter}/absences`))
      .send({ ...away, to: null })
      .expect(200);
    const path = at(`/${shop.painter}/absences/${body.person.absences[0].id}`);
    expect((await agent.delete(path).expect(200)).body.absences).toEqual([]);
    await agent.delete(path).expect(404);
  });

  test('ends after it begins', async () => {
    const { body } = await agent
      .post(at(`/${shop.painter}/absences`))
      .send({ ...away, to: away.from })
      .expect(400);
    expect(body.error.fields).toMatchObject([{ path: 'body.to' }]);
  });

  test('is entered by a lead too, who may not change people', async () => {
    const lead = await signedIn(app, await makeMember(app.owner, shop, { role: 'lead' }));
    await lead
      .post(at(`/${shop.painter}/absences`))
      .send(away)
      .expect(200);
    await lead
      .patch(at(`/${shop.painter}`))
      .send({ version: 1, name: 'Mine' })
      .expect(403);
    expect((await lead.get(at()).expect(200)).body.members).toEqual([]);
  });
});

describe('who leaves', () => {
  const retire = (lastDay: string | null, version = 1) =>
    agent.post(at(`/${shop.painter}/retire`)).send({ version, lastDay });

  test('is kept while posted work names them, and the work is named', async () => {
    const { stageId, jobId } = await booked('2026-03-12T09:00', '2026-03-12T10:00');
    const { body } = await retire(null).expect(422);
    expect(body.error).toMatchObject({ code: 'refused', reasons: [{ code: 'still-booked', stageId, ids: [jobId] }] });
    await retire('2026-03-11').expect(422);
    expect((await painter()).retired).toBe(false);
  });

  test('goes after a last day: away from the day after, and back again if it was a mistake', async () => {
    await booked('2026-03-12T09:00', '2026-03-12T10:00');
    expect((await retire('2026-03-12').expect(200)).body).toMatchObject({
      leavesOn: '2026-03-12',
      retired: false,
      version: 2,
      absences: [{ from: '2026-03-12T23:00:00.000Z', to: null }],
    });
    await retire('2026-03-12').expect(200);
    const { body } = await agent
      .post(at(`/${shop.painter}/bring-back`))
      .send({ version: 2 })
      .expect(200);
    expect(body).toMatchObject({ leavesOn: null, retired: false, absences: [] });
  });

  test('is off the roster at once where nothing names them', async () => {
    expect((await retire(null).expect(200)).body).toMatchObject({ retired: true });
    await retire(null).expect(200);
    expect(await changes()).toHaveLength(1);
    expect((await roster()).people.map(({ name }) => name)).toEqual(['Helper', 'Painter']);
  });
});

test('rows stand in the order that is given', async () => {
  await agent
    .post(at('-order'))
    .send({ personIds: [shop.helper, shop.painter] })
    .expect(204);
  expect((await roster()).people.map(({ name }) => name)).toEqual(['Helper', 'Painter']);
});
