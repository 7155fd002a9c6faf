import { v7 as uuid } from 'uuid';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { stranger, testApp, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop } from '../helpers/factories.ts';
import { mailServer, type MailServer } from '../helpers/mail.ts';
import { eventually, startTestWorker } from '../helpers/worker.ts';

let database: TestDatabase;
let app: TestApp;
let mail: MailServer;
let stopWorker: () => Promise<void>;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
  mail = await mailServer();
  stopWorker = startTestWorker(app.deps, mail.url);
});
afterAll(async () => {
  await stopWorker();
  await mail.close();
  await app.close();
  await database.drop();
});

const ask = (email: string) => stranger(app).post('/api/sign-up').send({ email });
async function letterTo(email: string) {
  const got = () => mail.letters.filter(({ to }) => [to].flat().some((one) => one?.text === email));
  const [letter] = await eventually(
    async () => got(),
    (letters) => letters.length > 0,
  );
  return letter?.text ?? '';
}
const tokenIn = (text: string): string => /\/sign-up#([\w-]+)/.exec(text)?.[1] ?? expect.fail('no link');
const filled = (token: string) => ({
  token,
  name: 'Ada',
  password: 'a few words in a row',
  shop: { id: uuid(), name: 'Saltmarsh', timeZone: 'Europe/Berlin' },
});

test('a letter proves the address; its link makes account and shop, and signs in, once', async () => {
  await ask('ada@new.test').expect(204);
  const token = tokenIn(await letterTo('ada@new.test'));
  expect((await stranger(app).post('/api/sign-up/read').send({ token }).expect(200)).body).toEqual({
    email: 'ada@new.test',
  });
  const agent = stranger(app);
  const { body } = await agent.post('/api/sign-up/use').send(filled(token)).expect(200);
  expect(body).toMatchObject({ account: { email: 'ada@new.test', name: 'Ada' }, shops: [{ role: 'owner' }] });
  await agent.get(`/api/shops/${body.shops[0].id}/first-steps`).expect(200);
  await stranger(app).post('/api/sign-up/use').send(filled(token)).expect(410);
  await stranger(app).post('/api/sign-up/read').send({ token }).expect(410);
});

test('of two who use a link at once one gets the shop', async () => {
  await ask('bea@new.test').expect(204);
  const token = tokenIn(await letterTo('bea@new.test'));
  const use = async () => (await stranger(app).post('/api/sign-up/use').send(filled(token))).status;
  expect((await Promise.all([use(), use()])).sort()).toEqual([200, 410]);
  expect(await app.owner('account').where({ email: 'bea@new.test' })).toHaveLength(1);
});

test('a known address gets the same answer and leaves the same traces; only its letter differs', async () => {
  const known = await makeMember(app.owner, await makeShop(app.owner), { role: 'painter', name: 'Pat' });
  const answers = await Promise.all([ask(known.email), ask('cem@new.test')]);
  const told = answers.map(({ status, text, headers }) => [status, text, Object.keys(headers).sort()]);
  expect(told[0]).toEqual(told[1]);
  for (const email of [known.email, 'cem@new.test'])
    expect(await app.owner('account_token').where({ kind: 'sign-up', email })).toHaveLength(1);
  const text = await letterTo(known.email);
  expect(text).toContain('has an account already');
  expect(text).not.toContain('/sign-up#');
});

test('a link is good for a day', async () => {
  await ask('dag@new.test').expect(204);
  const token = tokenIn(await letterTo('dag@new.test'));
  app.clock.advance(86_400_001);
  await stranger(app).post('/api/sign-up/use').send(filled(token)).expect(410);
});

test('letters are not sent without end', async () => {
  for (let n = 0; n < 5; n += 1) await ask('eve@new.test').expect(204);
  await ask('eve@new.test').expect(429);
});

test('in production it is closed unless the environment opens it', async () => {
  const production = { NODE_ENV: 'production' };
  for (const [env, open] of [
    [production, false],
    [{ ...production, SIGN_UP: 'open' }, true],
    [{ SIGN_UP: 'closed' }, false],
  ] as const) {
    const other = await testApp(database, { env });
    expect((await stranger(other).get('/api/sign-up').expect(200)).body).toEqual({ open });
    if (!open) await stranger(other).post('/api/sign-up').send({ email: 'fay@new.test' }).expect(404);
    await other.close();
  }
});
