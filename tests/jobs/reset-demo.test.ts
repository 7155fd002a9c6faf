import { afterAll, beforeAll, expect, test } from 'vitest';
import signIns from '../../seeds/demo-sign-ins.json' with { type: 'json' };
import { demoShopId, seedDemo } from '../../seeds/index.ts';
import { signedIn, testApp, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop } from '../helpers/factories.ts';
import { mailServer, type MailServer } from '../helpers/mail.ts';
import { eventually, startTestWorker } from '../helpers/worker.ts';

let database: TestDatabase;
let app: TestApp;
let agent: Agent;
let mail: MailServer;
let stopWorker: () => Promise<void>;
const shop = `/api/shops/${demoShopId}`;
const asked = { words: 'Reset the demo' };

beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database, { now: new Date('2026-03-10T13:00:00Z') });
  await seedDemo(database.ownerUrl, app.clock.now);
  const owner = signIns.find(({ role }) => role === 'owner') ?? expect.fail('the demo has no owner');
  agent = await signedIn(app, owner);
  mail = await mailServer();
  stopWorker = startTestWorker(app.deps, mail.url);
});
afterAll(async () => {
  await stopWorker();
  await mail.close();
  await app.close();
  await database.drop();
});

/** Everything that can be seen of the shop, but for what counts on: numbers of changes and versions of rows. */
async function seen() {
  const read = async (path: string) => (await agent.get(`${shop}/${path}`).expect(200)).body as Record<string, unknown>;
  const span = 'from=2026-03-09T00:00:00Z&to=2026-03-14T00:00:00Z';
  const { bars, rows } = await read(`day?${span}`);
  return {
    jobs: (await read('jobs?state=all&size=200'))['rows'],
    people: (await read('people'))['people'],
    sheets: ((await read('process-sheets'))['sheets'] as { id: string; name: string }[]).map(({ id, name }) => [
      id,
      name,
    ]),
    bars,
    rows,
    counts: await tables(),
  };
}

/** Rows of each table of the shop. */
async function tables(): Promise<Record<string, number>> {
  const counts: Record<string, number> = {};
  for (const table of ['person', 'shift', 'absence', 'place', 'zone', 'lamp', 'booking', 'occupancy', 'stage', 'draft'])
    counts[table] = Number((await app.owner(table).where({ shop_id: demoShopId }).count())[0]?.['count']);
  return counts;
}

test(
  'whatever was done in the demo is undone, for everybody, and live screens are told',
  { timeout: 240_000 },
  async () => {
    const before = await seen();
    const people = before.people as { id: string; version: number }[];
    const somebody = people[0] ?? expect.fail('nobody');
    await agent.patch(`${shop}/people/${somebody.id}`).send({ version: somebody.version, name: 'Mine' }).expect(200);
    await agent
      .post(`${shop}/people/${somebody.id}/absences`)
      .send({ from: '2026-03-11T08:00:00Z', to: null, reason: '' })
      .expect(200);
    await agent.post(`${shop}/draft`).send({}).expect(200);
    expect(await seen()).not.toEqual(before);
    const [{ change_seq: seq }] = (await app.owner('shop').where({ id: demoShopId })) as [{ change_seq: string }];

    await agent.post(`${shop}/reset-demo`).send(asked).expect(204);
    await agent.post(`${shop}/reset-demo`).send(asked).expect(204);
    await eventually(
      async () => (await agent.get(`${shop}/first-steps`).expect(200)).body as { resetting: boolean },
      ({ resetting }) => !resetting,
      180_000,
    );
    expect(await app.owner('task').where({ kind: 'reset-demo' })).toMatchObject([{ last_error: null, dead_at: null }]);
    expect(await seen()).toEqual(before);
    const told = await app.owner('change').where({ shop_id: demoShopId }).andWhere('account_id', null).orderBy('seq');
    expect(told.map(({ kind }: { kind: string }) => kind)).toEqual(
      expect.arrayContaining(['shop-changed', 'job-changed']),
    );
    expect(Math.min(...told.map((row: { seq: string }) => Number(row.seq)))).toBeGreaterThan(Number(seq));
  },
);

test('it takes the words, and a demo', async () => {
  const { body } = await agent.post(`${shop}/reset-demo`).send({ words: 'yes' }).expect(400);
  expect(body.error.fields[0].path).toBe('body.words');
  const own = await makeShop(app.owner);
  const ownAgent = await signedIn(app, await makeMember(app.owner, own, { role: 'owner' }));
  await ownAgent.post(`/api/shops/${own.id}/reset-demo`).send(asked).expect(404);
});
