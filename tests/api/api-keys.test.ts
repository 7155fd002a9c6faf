import { createHash } from 'node:crypto';
import request from 'supertest';
import { v7 as uuid } from 'uuid';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { ApiKey } from '#contracts/api-keys.ts';
import { signedIn, testApp, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { aZone, figures } from '../helpers/factories-air.ts';
import { makeMember, makeShop } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
let shop: { id: string };
let zone: { id: string; name: string };
let owner: Agent;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
  shop = await makeShop(app.owner);
  zone = await aZone(app.owner, shop, { name: 'Booth 1' });
  owner = await signedIn(app, await makeMember(app.owner, shop, { role: 'owner' }));
});
afterAll(async () => {
  await app.close();
  await database.drop();
});
beforeEach(() => app.owner('rate_limit').delete());

const keysOf = (id: string) => `/api/shops/${id}/api-keys`;
async function aKey(agent = owner, shopId = shop.id): Promise<{ key: ApiKey; secret: string }> {
  const answer = await agent.post(keysOf(shopId)).send({ id: uuid(), label: 'Logger in booth 1' }).expect(200);
  return answer.body as { key: ApiKey; secret: string };
}
const send = (secret: string | null, body: object) => {
  const post = request(app.url).post('/api/readings').set('Content-Type', 'application/json');
  return (secret === null ? post : post.set('Authorization', `Bearer ${secret}`)).send(JSON.stringify(body));
};
const sent = (given: object = {}) => ({ ...figures(), zone: 'Booth 1', ...given });
const stored = (id = shop.id) => app.owner('air_reading').where({ shop_id: id });

describe('a key', () => {
  test('is said once; only its hash is kept', async () => {
    const { key, secret } = await aKey();
    expect(secret).toMatch(/^ovk_[\w-]{64}$/);
    const row = await app.owner('api_key').where({ id: key.id }).first<Record<string, unknown>>();
    expect(JSON.stringify(row)).not.toContain(secret);
    expect(row?.['token_hash']).toEqual(createHash('sha256').update(secret).digest());
    const listed = await owner.get(keysOf(shop.id)).expect(200);
    expect(JSON.stringify(listed.body)).not.toContain(secret);
    expect(secret.endsWith(key.hint)).toBe(true);
    const again = await owner.post(keysOf(shop.id)).send({ id: key.id, label: 'Logger in booth 1' }).expect(409);
    expect(again.body).toEqual({ error: { code: 'taken' } });
  });

  test('is not kept with the answers to requests that may come again', async () => {
    const post = () => owner.post(keysOf(shop.id)).set('Idempotency-Key', 'make-a-key-once');
    const id = uuid();
    const made = await post().send({ id, label: 'Logger' }).expect(200);
    const { secret } = made.body as { secret: string };
    const kept = await app.owner('idempotency').where({ shop_id: shop.id });
    expect(JSON.stringify(kept)).not.toContain(secret);
    await post().send({ id, label: 'Logger' }).expect(409);
  });

  test('notes when it was used', async () => {
    const { key, secret } = await aKey();
    await send(secret, sent()).expect(200);
    const { body } = await owner.get(keysOf(shop.id)).expect(200);
    const listed = (body as { keys: ApiKey[] }).keys.find(({ id }) => id === key.id);
    expect(listed?.lastUsedAt).toBe(app.clock.now.toISOString());
  });

  test('opens nothing once it is revoked; that is for good', async () => {
    const { key, secret } = await aKey();
    await send(secret, sent()).expect(200);
    const revoke = () =>
      owner
        .post(`${keysOf(shop.id)}/${key.id}/revoke`)
        .send({})
        .expect(200);
    const first = (await revoke()).body as ApiKey;
    expect(first.revokedAt).toBe(app.clock.now.toISOString());
    app.clock.advance(60_000);
    expect(((await revoke()).body as ApiKey).revokedAt).toBe(first.revokedAt);
    const refused = await send(secret, sent()).expect(401);
    expect(refused.body).toEqual({ error: { code: 'not-signed-in' } });
  });
});

describe('the door of loggers', () => {
  test('says the same to everybody without a good key, whatever they send', async () => {
    const { secret } = await aKey();
    const wrong = [
      null,
      'ovk_',
      'nonsense',
      `${secret}x`,
      secret.slice(0, -1) + (secret.endsWith('A') ? 'B' : 'A'),
      `ovk_${'A'.repeat(64)}`,
      `ovk_${'_'.repeat(64)}`,
    ];
    for (const key of wrong)
      for (const body of [sent(), { nonsense: true }]) {
        const { status, body: said } = await send(key, body);
        expect([key, status, said]).toEqual([key, 401, { error: { code: 'not-signed-in' } }]);
      }
  });

  test('is not opened by a session, and a key opens no other door', async () => {
    await owner.post('/api/readings').send(sent()).expect(401);
    const { secret } = await aKey();
    await request(app.url).get(keysOf(shop.id)).set('Authorization', `Bearer ${secret}`).expect(401);
    await request(app.url).get(`/api/shops/${shop.id}/air`).set('Authorization', `Bearer ${secret}`).expect(401);
  });

  test('a key of one shop writes into that shop alone', async () => {
    const other = await makeShop(app.owner);
    const otherZone = await aZone(app.owner, other, { name: 'Elsewhere' });
    const otherOwner = await signedIn(app, await makeMember(app.owner, other, { role: 'owner' }));
    const { secret } = await aKey(otherOwner, other.id);
    const before = await stored();
    for (const name of [zone.id, zone.name]) {
      const { body } = await send(secret, sent({ zone: name })).expect(400);
      expect((body as { error: { fields: object[] } }).error.fields).toEqual([
        { path: 'body.0.zone', message: 'no such zone' },
      ]);
    }
    // Its shop's name exchanged for the other's: the hash is of no key there.
    const bytes = Buffer.from(secret.slice(4), 'base64url');
    Buffer.from(shop.id.replaceAll('-', ''), 'hex').copy(bytes);
    await send(`ovk_${bytes.toString('base64url')}`, sent()).expect(401);
    // The same id in two shops is two readings.
    const id = uuid();
    const mine = await aKey();
    await send(secret, sent({ id, zone: otherZone.name })).expect(200);
    await send(mine.secret, sent({ id })).expect(200);
    expect(await stored(other.id)).toHaveLength(1);
    expect(await stored()).toHaveLength(before.length + 1);
  });
});

describe('what is sent', () => {
  let secret: string;
  beforeAll(async () => {
    ({ secret } = await aKey());
  });

  test('a list, by name or id, is written once however often it comes', async () => {
    const list = Array.from({ length: 500 }, (_, i) =>
      sent({ zone: i % 2 ? zone.id : 'booth 1', at: new Date(Date.UTC(2026, 2, 1) + i * 60_000).toISOString() }),
    );
    expect((await send(secret, list).expect(200)).body).toEqual({ written: 500, duplicate: 0 });
    expect((await send(secret, list).expect(200)).body).toEqual({ written: 0, duplicate: 500 });
    const half = [...list.slice(0, 10), sent({ celsius: 21 })];
    expect((await send(secret, half).expect(200)).body).toEqual({ written: 1, duplicate: 10 });
  });

  test('an id with another content is listed, and nothing of the list is written', async () => {
    const first = sent({ celsius: 18 });
    await send(secret, first).expect(200);
    const before = await stored().count();
    const refused = await send(secret, [sent(), { ...first, celsius: 19 }, sent()]).expect(409);
    expect(refused.body).toEqual({
      error: { code: 'taken', fields: [{ path: 'body.1.id', message: 'stands for another reading' }] },
    });
    // Twice in one list with two contents is the same fault.
    const id = uuid();
    await send(secret, [sent({ id }), sent({ id, humidity: 51 })]).expect(409);
    expect(await stored().count()).toEqual(before);
  });

  test('all or nothing, with every fault and where it stands', async () => {
    const before = await stored().count();
    const { body } = await send(secret, [sent(), sent({ celsius: 300 }), sent({ humidity: -1, at: 'noon' })]).expect(
      400,
    );
    expect((body as { error: { fields: { path: string }[] } }).error.fields.map(({ path }) => path).sort()).toEqual([
      'body.1.celsius',
      'body.2.at',
      'body.2.humidity',
    ]);
    const later = await send(secret, [sent(), sent({ zone: 'Cellar' }), sent({ at: '2026-03-20T00:00:00Z' })]).expect(
      400,
    );
    expect((later.body as { error: { fields: object[] } }).error.fields).toEqual([
      { path: 'body.1.zone', message: 'no such zone' },
      { path: 'body.2.at', message: 'lies in the future' },
    ]);
    expect(await stored().count()).toEqual(before);
  });

  test.each([
    ['nothing', []],
    ['501', Array.from({ length: 501 }, () => sent())],
    ['an unknown field', sent({ pressure: 1013 })],
  ])('%s is refused', async (_, body) => {
    await send(secret, body).expect(400);
  });

  test('a body that is no JSON, or too long', async () => {
    const raw = (text: string) =>
      request(app.url)
        .post('/api/readings')
        .set('Authorization', `Bearer ${secret}`)
        .set('Content-Type', 'application/json')
        .send(text);
    await raw('{').expect(400);
    await raw(`"${'x'.repeat(300_000)}"`).expect(413);
  });
});

test('sixty a minute for a key, over all processes; then it is told when to come again', async () => {
  const { secret } = await aKey();
  const other = await testApp(database);
  const reading = sent();
  const ask = (at: TestApp) =>
    request(at.url).post('/api/readings').set('Authorization', `Bearer ${secret}`).send(reading);
  for (let n = 0; n < 60; n += 1) await ask(n % 2 ? app : other).expect(200);
  const refused = await ask(other).expect(429);
  expect(refused.body).toEqual({ error: { code: 'too-many' } });
  expect(Number(refused.headers['retry-after'])).toBeGreaterThan(0);
  expect(Number(refused.headers['retry-after'])).toBeLessThanOrEqual(60);
  // Another key of the shop has its own minute.
  await send((await aKey()).secret, sent()).expect(200);
  await other.close();
});

test('who guesses keys is held up by address', async () => {
  const guesses = await Promise.all(Array.from({ length: 310 }, () => send('ovk_guess', sent())));
  expect(guesses.filter(({ status }) => status === 401)).toHaveLength(300);
  expect(guesses.filter(({ status }) => status === 429)).toHaveLength(10);
});
