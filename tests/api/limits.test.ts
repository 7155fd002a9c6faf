import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { addressOf } from '#server/http/limits.ts';
import { stranger, testApp, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
let other: TestApp;
beforeAll(async () => {
  database = await freshDatabase();
  // Two processes of one program, each behind a proxy that says who asks.
  app = await testApp(database, { env: { BEHIND_PROXY: 'true' } });
  other = await testApp(database, { env: { BEHIND_PROXY: 'true' } });
});
afterAll(async () => {
  await app.close();
  await other.close();
  await database.drop();
});

const attempt = (at: TestApp, from: string, body: object) =>
  stranger(at).post('/api/session').set('X-Forwarded-For', from).send(body);

describe('tries at a password', () => {
  test('ten wrong ones for an account from one address, over all processes; the owner gets in from another', async () => {
    const lead = await makeMember(app.owner, await makeShop(app.owner), { role: 'lead' });
    const wrong = { email: lead.email, password: 'a guess' };
    for (let tried = 0; tried < 10; tried += 1) await attempt(tried % 2 ? app : other, '192.0.2.1', wrong).expect(401);
    const refused = await attempt(other, '192.0.2.1', wrong).expect(429);
    expect(refused.body).toEqual({ error: { code: 'too-many' } });
    expect(Number(refused.headers['retry-after'])).toBeGreaterThan(0);
    expect(Number(refused.headers['retry-after'])).toBeLessThanOrEqual(15 * 60);
    // Not even the right one gets in from there, or the limit would tell when it was guessed.
    await attempt(app, '192.0.2.1', { email: lead.email, password: lead.password }).expect(429);
    await attempt(app, '198.51.100.7', { email: lead.email, password: lead.password }).expect(200);
  });

  test('an unknown account is limited in the same way', async () => {
    const body = { email: 'nobody@shop.test', password: 'a guess' };
    for (let tried = 0; tried < 10; tried += 1) await attempt(app, '192.0.2.2', body).expect(401);
    await attempt(app, '192.0.2.2', body).expect(429);
  });

  test('all at the same time are counted too', async () => {
    const body = { email: 'many@shop.test', password: 'a guess' };
    const answers = await Promise.all(Array.from({ length: 30 }, () => attempt(app, '192.0.2.3', body)));
    expect(answers.filter((answer) => answer.status === 401)).toHaveLength(10);
    expect(answers.filter((answer) => answer.status === 429)).toHaveLength(20);
  });

  test('a right one wipes the slate', async () => {
    const lead = await makeMember(app.owner, await makeShop(app.owner), { role: 'lead' });
    const right = { email: lead.email, password: lead.password };
    for (let round = 0; round < 3; round += 1) {
      for (let tried = 0; tried < 8; tried += 1)
        await attempt(app, '192.0.2.4', { ...right, password: 'a guess' }).expect(401);
      await attempt(app, '192.0.2.4', right).expect(200);
    }
  });
});

test('asking for letters: five an hour for an address of mail from one place, known or not', async () => {
  const ask = (email: string) =>
    stranger(app).post('/api/password-reset').set('X-Forwarded-For', '192.0.2.9').send({ email });
  const { email } = await makeMember(app.owner, await makeShop(app.owner), { role: 'lead' });
  for (const address of [email, 'nobody@shop.test']) {
    for (let asked = 0; asked < 5; asked += 1) await ask(address).expect(204);
    await ask(address).expect(429);
  }
});

describe('what counts as one address', () => {
  test.each([
    ['::ffff:192.0.2.1', '192.0.2.1'],
    ['192.0.2.1', '192.0.2.1'],
    ['2001:db8:1:2:3:4:5:6', '2001:db8:1:2::/64'],
    ['2001:db8:1:2::9', '2001:db8:1:2::/64'],
    ['2001:0db8::1', '2001:db8:0:0::/64'],
    ['::1', '0:0:0:0::/64'],
  ])('%s is %s', (ip, address) => {
    expect(addressOf({ ip })).toBe(address);
  });

  test('without a proxy nobody can claim another one', async () => {
    const direct = await testApp(database);
    const body = { email: 'claims@shop.test', password: 'a guess' };
    for (let tried = 0; tried < 10; tried += 1) await attempt(direct, `192.0.2.${100 + tried}`, body).expect(401);
    await attempt(direct, '192.0.2.200', body).expect(429);
    await direct.close();
  });
});
