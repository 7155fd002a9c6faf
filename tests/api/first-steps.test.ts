import { v7 as uuid } from 'uuid';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { FirstSteps } from '#contracts/first-steps.ts';
import type { Me } from '#contracts/session.ts';
import { signedIn, stranger, testApp, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
let agent: Agent;
let shopId: string;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
});
beforeEach(async () => {
  // An account whose only shop is another one.
  const member = await makeMember(app.owner, await makeShop(app.owner), { role: 'painter' });
  agent = await signedIn(app, member);
  shopId = uuid();
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

const open = (body: object = {}) =>
  agent.post('/api/shops').send({ id: shopId, name: 'Saltmarsh', timeZone: 'Europe/Berlin', ...body });
const steps = (step = '') => `/api/shops/${shopId}/first-steps${step}`;
const take = (step: string, body: object) => agent.post(steps(`/${step}`)).send(body);
const doneOf = ({ steps }: FirstSteps) => steps.filter(({ done }) => done).map(({ step }) => step);

const hours = { timeZone: 'Europe/Berlin', days: ['MO', 'TU', 'WE', 'TH', 'FR'], from: '07:00', to: '18:00' };
const places = {
  booths: 1,
  volumeM3: 96,
  airFlowM3PerHour: 20_000,
  bakeLimitCelsius: 80,
  clearanceMinutes: 5,
  stations: 2,
  lamps: 2,
  lampKilowatts: 6,
  circuitKilowatts: 11,
};
const people = {
  people: [
    { name: 'Ada', skills: ['paint', 'prep'], sprayTrainedOn: '2025-05-01', isMe: true },
    { name: 'Ben', skills: ['prep', 'polish'], sprayTrainedOn: null, isMe: false },
  ],
  from: '07:00',
  to: '15:30',
  onlyWarn: false,
};

describe('a new shop', () => {
  test('belongs to who opened it, once, with weights and cleaning to begin with', async () => {
    const { body } = await open().expect(200);
    expect(body.shops).toContainEqual({
      id: shopId,
      name: 'Saltmarsh',
      timeZone: 'Europe/Berlin',
      role: 'owner',
      personId: null,
    });
    expect((await open().expect(200)).body.shops).toHaveLength(2);
    const [shop] = await app.owner('shop').where({ id: shopId });
    expect(shop).toMatchObject({ is_demo: false, objective: { tardiness: 1, unplaced: 100_000 } });
    expect(await app.owner('change').where({ shop_id: shopId })).toMatchObject([{ kind: 'shop-changed' }]);
  });

  test.each([{ timeZone: 'Atlantis/Capital' }, { timeZone: '+01:00' }, { name: ' ' }, { id: 'one' }])(
    'with %j is refused',
    async (wrong) => {
      await open(wrong).expect(400);
      expect(await app.owner('shop').where({ name: 'Saltmarsh', id: shopId })).toEqual([]);
    },
  );

  test('takes no id of somebody else’s shop', async () => {
    const other = await makeShop(app.owner);
    const { body } = await open({ id: other.id }).expect(409);
    expect(body.error.code).toBe('key-reused');
    expect(await app.owner('membership').where({ shop_id: other.id })).toEqual([]);
  });

  test('needs somebody who is signed in, and not a hundred of them', async () => {
    await stranger(app).post('/api/shops').send({ id: shopId, name: 'x', timeZone: 'UTC' }).expect(401);
    for (let n = 0; n < 10; n += 1) await open({ id: uuid() }).expect(200);
    await open({ id: uuid() }).expect(429);
  });
});

describe('the first steps', () => {
  beforeEach(async () => {
    await open().expect(200);
  });

  test('lead from nothing to a first plan, each of them done once', async () => {
    expect(doneOf((await agent.get(steps()).expect(200)).body as FirstSteps)).toEqual([]);
    await take('hours', hours).expect(200);
    await take('places', places).expect(200);
    await take('people', people).expect(200);
    const starter = ((await agent.get(steps()).expect(200)).body as FirstSteps).starter.map(({ key }) => key);
    await take('sheets', { sheets: starter }).expect(200);
    const { sheets } = (await agent.get(`/api/shops/${shopId}/process-sheets`).expect(200)).body as {
      sheets: { id: string; name: string }[];
    };
    expect(sheets).toHaveLength(starter.length);
    const sheetId = sheets.find(({ name }) => /New steel panel/.test(name))?.id;
    const job = { jobId: uuid(), runId: uuid(), sheetId, title: 'Wing', vehicle: '', notes: '', promiseAt: null };
    const { body } = await take('job', job).expect(200);
    expect(doneOf(body as FirstSteps)).toEqual(['hours', 'places', 'people', 'sheets', 'job']);
    expect(body.has).toMatchObject({ booths: 1, stations: 2, lamps: 2, people: 2, jobs: 1 });
    expect(await app.owner('task').where({ shop_id: shopId, kind: 'run-plan' })).toHaveLength(1);

    // Again, as after a lost answer or in a second tab: nothing more is there.
    await take('places', { ...places, booths: 3 }).expect(200);
    await take('people', people).expect(200);
    await take('sheets', { sheets: starter }).expect(200);
    await take('job', { ...job, jobId: uuid(), runId: uuid() }).expect(200);
    expect((await agent.get(steps()).expect(200)).body.has).toEqual(body.has);
  });

  test('two tabs that take a step at once take it once', async () => {
    await Promise.all([take('places', places).expect(200), take('places', { ...places, booths: 2 }).expect(200)]);
    const { body } = await agent.get(steps()).expect(200);
    expect([1, 2]).toContain((body as FirstSteps).has.booths);
    expect(await app.owner('lamp').where({ shop_id: shopId })).toHaveLength(2);
  });

  test('a booth whose air flow is not known bakes nothing; every station shares the air of its bay', async () => {
    await take('places', { ...places, airFlowM3PerHour: null }).expect(200);
    const rows = await app.owner('place').where({ shop_id: shopId }).orderBy('position');
    expect(rows).toMatchObject([
      { kind: 'booth', bakes: false, air_flow_m3_per_hour: null },
      { kind: 'prep', bakes: false },
      { kind: 'prep' },
      { kind: 'rack', zone_id: null },
    ]);
    expect(rows[1]?.zone_id).toBe(rows[2]?.zone_id);
    expect(rows[0]?.zone_id).not.toBe(rows[1]?.zone_id);
  });

  test('the owner may be one of the people; training is a block until the owner says otherwise', async () => {
    await take('people', { ...people, onlyWarn: true }).expect(200);
    const session = await agent.get('/api/session').expect(200);
    const shop = (session.body as Me).shops.find(({ id }) => id === shopId);
    const [ada] = await app.owner('person').where({ shop_id: shopId, name: 'Ada' });
    expect(shop?.personId).toBe(ada?.id);
    expect(await app.owner('shop').where({ id: shopId })).toMatchObject([{ training_blocks: false }]);
  });

  test('every data sheet of the starter set says that it is common practice', async () => {
    await take('sheets', { sheets: ['bumper'] }).expect(200);
    const rows = await app.owner('coating').where({ shop_id: shopId });
    expect(rows.length).toBeGreaterThan(3);
    for (const { sheet } of rows) expect(JSON.stringify(sheet)).toContain('check every figure');
    const [version] = await app.owner('process_sheet_version').where({ shop_id: shopId });
    const ids = new Set(rows.map(({ id }: { id: string }) => id));
    const named = (version?.body as { stages: { coatingId: string | null }[] }).stages.flatMap(
      ({ coatingId }) => coatingId ?? [],
    );
    expect(named.length).toBeGreaterThan(0);
    expect(named.every((id) => ids.has(id))).toBe(true);
  });

  test.each([
    ['hours', { ...hours, to: '06:00' }, 'body.to'],
    ['hours', { ...hours, days: [] }, 'body.days'],
    ['places', { ...places, booths: 0 }, 'body.booths'],
    ['places', { ...places, bakeLimitCelsius: 120 }, 'body.bakeLimitCelsius'],
    ['people', { ...people, people: [] }, 'body.people'],
    ['people', { ...people, people: people.people.map((one) => ({ ...one, isMe: true })) }, 'body.people'],
    ['sheets', { sheets: ['none such'] }, 'body.sheets'],
  ])('%s with what cannot be is refused by its field and leaves nothing', async (step, body, path) => {
    const answer = await take(step, body).expect(400);
    expect(answer.body.error.fields[0].path).toBe(path);
    expect(doneOf((await agent.get(steps()).expect(200)).body as FirstSteps)).toEqual([]);
  });
});
