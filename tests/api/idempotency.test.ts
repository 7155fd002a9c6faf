import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { once } from '#server/services/once.ts';
import { inShop } from '#server/db/in-shop.ts';
import { signedIn, testApp, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop, type MadeMember } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
let second: TestApp;
let owner: MadeMember;
let agent: Agent;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
  second = await testApp(database);
});
beforeEach(async () => {
  owner = await makeMember(app.owner, await makeShop(app.owner), { role: 'owner' });
  agent = await signedIn(app, owner);
});
afterAll(async () => {
  await app.close();
  await second.close();
  await database.drop();
});

const invite = (as: Agent, key: string, email = 'new@shop.test') =>
  as
    .post(`/api/shops/${owner.shopId}/invitations`)
    .set('Idempotency-Key', key)
    .send({ email, role: 'painter', personId: null });
const invitations = () => app.owner('account_token').where({ shop_id: owner.shopId });
const letters = () => app.owner('letter').where({ shop_id: owner.shopId });

describe('a request with a key', () => {
  test('is done once and answered the same five times', async () => {
    const key = randomUUID();
    const answers = [];
    for (let sent = 0; sent < 5; sent += 1) answers.push(await invite(agent, key).expect(200));
    expect(new Set(answers.map((answer) => answer.text)).size).toBe(1);
    expect(await invitations()).toHaveLength(1);
    expect(await letters()).toHaveLength(1);
  });

  test('ten at the same time, in two processes: one effect, ten equal answers', async () => {
    const key = randomUUID();
    const there = await signedIn(second, owner);
    const answers = await Promise.all(
      Array.from({ length: 10 }, (_, number) => invite(number % 2 ? agent : there, key).expect(200)),
    );
    expect(new Set(answers.map((answer) => answer.text)).size).toBe(1);
    expect(await invitations()).toHaveLength(1);
    expect(await letters()).toHaveLength(1);
  });

  test('another request with its key is refused and changes nothing', async () => {
    const key = randomUUID();
    await invite(agent, key).expect(200);
    const other = await invite(agent, key, 'other@shop.test').expect(409);
    expect(other.body).toEqual({ error: { code: 'key-reused' } });
    const path = `/api/shops/${owner.shopId}/members/${owner.memberId}`;
    await agent.patch(path).set('Idempotency-Key', key).send({ disabled: false }).expect(409);
    expect(await invitations()).toHaveLength(1);
  });

  test("is somebody's own: another member with the same key does it for itself", async () => {
    const other = await signedIn(app, await makeMember(app.owner, { id: owner.shopId }, { role: 'owner' }));
    const key = randomUUID();
    await invite(agent, key, 'one@shop.test').expect(200);
    await invite(other, key, 'two@shop.test').expect(200);
    expect(await invitations()).toHaveLength(2);
  });

  test('which was refused keeps nothing, and may be tried again', async () => {
    const key = randomUUID();
    const member = await makeMember(app.owner, { id: owner.shopId }, { role: 'painter' });
    await invite(agent, key, member.email).expect(409);
    await app.owner('membership').where({ id: member.memberId }).update({ disabled_at: app.clock.now });
    await invite(agent, key, member.email).expect(200);
  });

  test.each(['short', 'with blanks in it', 'x'.repeat(121)])('%j is no key', async (key) => {
    const answer = await invite(agent, key).expect(400);
    expect(answer.body.error.fields[0].path).toBe('headers.idempotency-key');
  });

  test('without one, each request is done', async () => {
    const send = (email: string) =>
      agent.post(`/api/shops/${owner.shopId}/invitations`).send({ email, role: 'painter', personId: null });
    await send('one@shop.test').expect(200);
    await send('one@shop.test').expect(200);
    expect(await invitations()).toHaveLength(2);
  });
});

describe('a crash between the effect and its record', () => {
  const actor = () => ({ ...owner, role: 'owner' as const });
  const request = (key: string) => ({ key, route: 'POST /test', hash: Buffer.from('same') });
  const rename = (name: string) =>
    inShop(app.deps.db, actor(), async (trx) => void (await trx('shop').where({ id: owner.shopId }).update({ name })));

  test('leaves neither: both are one transaction', async () => {
    const key = randomUUID();
    const dying = once(app.deps, actor(), request(key), async () => {
      await rename('Half done');
      throw new Error('the process dies here');
    });
    await expect(dying).rejects.toThrow('dies');
    expect(await app.owner('shop').where({ id: owner.shopId, name: 'Half done' })).toEqual([]);
    const done = await once(app.deps, actor(), request(key), async () => {
      await rename('Done');
      return { answer: 1 };
    });
    expect(done).toEqual({ answer: 1 });
    const again = await once(app.deps, actor(), request(key), () => Promise.reject(new Error('not twice')));
    expect(again).toEqual({ answer: 1 });
  });

  test('a part that fails and is caught undoes only itself', async () => {
    const done = await once(app.deps, actor(), request(randomUUID()), async () => {
      await rename('Kept');
      await inShop(app.deps.db, actor(), async (trx) => {
        await trx('shop').where({ id: owner.shopId }).update({ name: 'Undone' });
        await trx.raw('select 1 / 0');
      }).catch(() => undefined);
      return inShop(app.deps.db, actor(), async (trx) =>
        trx('shop').where({ id: owner.shopId }).first<{ name: string }>('name'),
      );
    });
    expect(done).toEqual({ name: 'Kept' });
  });
});

test('keys older than two days are forgotten as new ones come', async () => {
  const [old, fresh] = [randomUUID(), randomUUID()];
  await invite(agent, old, 'old@shop.test').expect(200);
  await app
    .owner('idempotency')
    .where({ key: old })
    .update({ created_at: new Date(app.clock.now.getTime() - 3 * 86_400_000) });
  await invite(agent, fresh, 'fresh@shop.test').expect(200);
  const keys = await app.owner('idempotency').where({ shop_id: owner.shopId }).select<{ key: string }[]>('key');
  expect(keys).toEqual([{ key: fresh }]);
});
