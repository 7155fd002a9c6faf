import { afterAll, beforeAll, beforeEach, expect, test } from 'vitest';
import { lookAtPeople } from '#server/services/look-at-people.ts';
import { signedIn, testApp, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { aShop, type TestShop } from '../helpers/factories-jobs.ts';
import { makeMember, makePerson } from '../helpers/factories.ts';
import { mailServer } from '../helpers/mail.ts';
import { eventually, startTestWorker } from '../helpers/worker.ts';

let database: TestDatabase;
let app: TestApp;
let shop: TestShop;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
});
beforeEach(async () => {
  shop = await aShop(app.deps.db);
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

const letters = () =>
  app.owner('letter').where({ shop_id: shop.id, kind: 'training-ends' }).orderBy(['subject_version', 'to_email']);

// 10 March 2026. Five years (40 CFR 63.11173(g)), told from the ninetieth day before.
test('a training that ends is written once to those who run and plan the shop', async () => {
  for (const role of ['owner', 'lead', 'painter', 'office'] as const)
    await makeMember(app.owner, shop, { role, email: `${role}@${shop.id}.test` });
  const day = { good: '2021-06-09', soon: '2021-06-08', lapsed: '2021-03-09' };
  await makePerson(app.owner, shop, { name: 'Good', sprayTrainedOn: day.good });
  const soon = await makePerson(app.owner, shop, { name: 'Soon', sprayTrainedOn: day.soon });
  await makePerson(app.owner, shop, { name: 'Lapsed', sprayTrainedOn: day.lapsed });
  const away = await makePerson(app.owner, shop, { name: 'Retired', sprayTrainedOn: day.soon });
  await app.owner('person').where({ id: away.id }).update({ retired_at: app.clock.now });

  await lookAtPeople(app.deps);
  await lookAtPeople(app.deps);
  expect(await letters()).toMatchObject([
    { subject_id: soon.id, subject_version: 20260608, to_email: `lead@${shop.id}.test` },
    { subject_id: soon.id, subject_version: 20260608, to_email: `owner@${shop.id}.test` },
  ]);

  // A refresher: the next end is told again when it comes.
  await app.owner('person').where({ id: soon.id }).update({ spray_trained_on: '2021-06-01' });
  await lookAtPeople(app.deps);
  expect((await letters()).map(({ subject_version }: { subject_version: number }) => subject_version)).toEqual([
    20260601, 20260601, 20260608, 20260608,
  ]);
});

test('the letter names the person and the day, and leads to the roster', { timeout: 120_000 }, async () => {
  const mail = await mailServer();
  const stop = startTestWorker(app.deps, mail.url);
  const owner = await makeMember(app.owner, shop, { role: 'owner', name: 'Olive' });
  await makePerson(app.owner, shop, { name: 'Kelmo', sprayTrainedOn: '2021-05-04' });
  await lookAtPeople(app.deps);
  const mine = () => mail.letters.filter(({ to }) => [to].flat().some((one) => one?.text === owner.email));
  await eventually(
    async () => mine(),
    (got) => got.length > 0,
  );
  await stop();
  expect(mine()[0]?.subject).toBe('Spray training of Kelmo ends on Monday 4 May 2026');
  expect(mine()[0]?.text).toContain('http://ovenbird.test/shop/people');
  await mail.close();
});

test('who has had their last day is off the roster the day after, not on it', async () => {
  const agent = await signedIn(app, await makeMember(app.owner, shop, { role: 'owner' }));
  const retire = { version: 1, lastDay: '2026-03-11' };
  await agent.post(`/api/shops/${shop.id}/people/${shop.helper}/retire`).send(retire).expect(200);
  const isRetired = async () => {
    await lookAtPeople(app.deps);
    const [row] = await app.owner('person').where({ id: shop.helper });
    return row?.retired_at !== null;
  };
  expect(await isRetired()).toBe(false);
  app.clock.advance(86_400_000);
  expect(await isRetired()).toBe(false);
  app.clock.advance(86_400_000);
  expect(await isRetired()).toBe(true);
  expect(await app.owner('change').where({ shop_id: shop.id }).orderBy('seq')).toMatchObject([
    { detail: { retired: 'Helper' } },
    { detail: { retired: ['Helper'] }, account_id: null },
  ]);
});
