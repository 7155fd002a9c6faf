import { randomUUID } from 'node:crypto';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { ChangeKind } from '#contracts/live.ts';
import { recordChange } from '#server/db/changes.ts';
import { inShop } from '#server/db/in-shop.ts';
import { signedIn, stranger, testApp, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop, type MadeMember } from '../helpers/factories.ts';
import { openLive, type LiveClient } from '../helpers/live.ts';
import { eventually } from '../helpers/worker.ts';

let database: TestDatabase;
let app: TestApp;
let second: TestApp;
let owner: MadeMember;
const opened: LiveClient[] = [];
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
  second = await testApp(database);
});
beforeEach(async () => {
  owner = await makeMember(app.owner, await makeShop(app.owner), { role: 'owner' });
});
afterEach(() => {
  for (const client of opened.splice(0)) client.close();
});
afterAll(async () => {
  await app.close();
  await second.close();
  await database.drop();
});

async function cookieOf(member: MadeMember): Promise<string> {
  const { email, password } = member;
  const answer = await stranger(app).post('/api/session').send({ email, password }).expect(200);
  return (answer.headers['set-cookie'] as unknown as string[])[0]?.split(';', 1)[0] ?? '';
}
async function look(member: MadeMember, at = app, lastId: string | null = null, cookie?: string): Promise<LiveClient> {
  const client = await openLive(at, { shopId: owner.shopId, cookie: cookie ?? (await cookieOf(member)), lastId });
  opened.push(client);
  // The stream is joined once it has said from where.
  if (client.status === 200 && lastId === null)
    await eventually(
      async () => client.lastId(),
      (id) => id !== null,
    );
  return client;
}
const change = (shop = owner, kind: ChangeKind = 'job-changed') => {
  const ids = [randomUUID()];
  return inShop(app.deps.db, shop, async (trx) => ({ seq: await recordChange(trx, shop, { kind, ids }), kind, ids }));
};
const told = async (client: LiveClient) => {
  const event = await client.next();
  return event === 'closed' ? event : { ...event, data: JSON.parse(event.data) as unknown };
};
const asEvent = (notice: { seq: number; kind: string; ids: string[] }) => ({
  event: 'change',
  id: String(notice.seq),
  data: notice,
});

describe('a live stream', () => {
  test('is a stream that nothing on the way may hold back', async () => {
    const client = await look(owner);
    expect(client.headers).toMatchObject({
      'content-type': 'text/event-stream; charset=utf-8',
      'cache-control': 'no-store, no-transform',
      'x-accel-buffering': 'no',
    });
    expect(client.headers['content-encoding']).toBeUndefined();
  });

  test('tells every screen of the shop, in every process, and none of another shop', async () => {
    const stranger = await makeMember(app.owner, await makeShop(app.owner), { role: 'owner' });
    const [one, two] = [await look(owner), await look(owner, second)];
    const foreign = await openLive(app, { shopId: stranger.shopId, cookie: await cookieOf(stranger) });
    opened.push(foreign);
    const notice = await change();
    expect(await told(one)).toEqual(asEvent(notice));
    expect(await told(two)).toEqual(asEvent(notice));
    const theirs = await change(stranger);
    expect(await told(foreign)).toEqual(asEvent(theirs));
  });

  test('a hundred changes, four at a time, come in order, none missing, none twice', async () => {
    const [one, two] = [await look(owner), await look(owner, second)];
    // Fewer at once than there are connections: who waits for one may be told that the shop is busy.
    const writer = async () => {
      for (let written = 0; written < 25; written++) await change();
    };
    await Promise.all([writer(), writer(), writer(), writer()]);
    for (const client of [one, two]) {
      const seqs: number[] = [];
      while (seqs.length < 100) {
        const event = await told(client);
        if (event !== 'closed') seqs.push(Number(event.id));
      }
      expect(seqs).toEqual(Array.from({ length: 100 }, (_, index) => index + 1));
    }
  });

  test('a change that was rolled back is told to nobody', async () => {
    const client = await look(owner);
    const failing = inShop(app.deps.db, owner, async (trx) => {
      await recordChange(trx, owner, { kind: 'job-changed', ids: [] });
      throw new Error('no');
    });
    await expect(failing).rejects.toThrow();
    const notice = await change();
    expect(await told(client)).toEqual(asEvent(notice));
    expect(notice.seq).toBe(1);
  });
});

describe('a connection that broke', () => {
  test('goes on where it was, with what changed meanwhile', async () => {
    const client = await look(owner);
    await change();
    await client.next();
    const seen = client.lastId();
    client.close();
    const missed = [await change(), await change(), await change()];
    const again = await look(owner, second, seen);
    for (const notice of missed) expect(await told(again)).toEqual(asEvent(notice));
    const next = await change();
    expect(await told(again)).toEqual(asEvent(next));
  });

  test('before anything changed knows its place too', async () => {
    const client = await look(owner);
    expect(client.lastId()).toBe('0');
    client.close();
    const missed = await change();
    expect(await told(await look(owner, app, '0'))).toEqual(asEvent(missed));
  });

  test('beside others that are up to date misses nothing', async () => {
    const upToDate = await look(owner);
    const notices = [await change(), await change(), await change()];
    for (const notice of notices) expect(await told(upToDate)).toEqual(asEvent(notice));
    const late = await look(owner, app, '1');
    const last = await change();
    for (const notice of [notices[1], notices[2], last]) expect(await told(late)).toEqual(notice && asEvent(notice));
    expect(await told(upToDate)).toEqual(asEvent(last));
  });

  test.each([
    [500, 'change'],
    [501, 'gap'],
  ])('for %i changes gets a %s', async (missed, event) => {
    await app.owner('shop').where({ id: owner.shopId }).update({ change_seq: missed });
    await app
      .owner('change')
      .insert(
        Array.from({ length: missed }, (_, index) => ({ shop_id: owner.shopId, seq: index + 1, kind: 'job-changed' })),
      );
    const again = await look(owner, app, '0');
    const first = await told(again);
    expect(first).toMatchObject(event === 'gap' ? { event, id: String(missed) } : { event, id: '1' });
    if (event !== 'gap') for (let seq = 2; seq <= missed; seq += 1) await again.next();
    const next = await change();
    expect(await told(again)).toEqual(asEvent(next));
  });

  test('with a number that never was fetches all anew', async () => {
    expect(await told(await look(owner, app, '77'))).toMatchObject({ event: 'gap', id: '0' });
  });

  test('of the server’s own to the database loses nothing', async () => {
    const client = await look(owner);
    await app.owner.raw(
      `select pg_terminate_backend(pid) from pg_stat_activity where datname = current_database() and query like 'listen %'`,
    );
    const notice = await change();
    expect(await told(client)).toEqual(asEvent(notice));
  });
});

describe('a stream ends, with a word, within seconds', () => {
  const bye = { event: 'bye', data: {} };

  test('when its session signs out, and only that one', async () => {
    const [here, there] = [await cookieOf(owner), await cookieOf(owner)];
    const [leaving, staying] = [await look(owner, second, null, here), await look(owner, app, null, there)];
    await stranger(app).delete('/api/session').set('Cookie', here).expect(204);
    expect(await told(leaving)).toMatchObject(bye);
    expect(await leaving.next()).toBe('closed');
    const notice = await change();
    expect(await told(staying)).toEqual(asEvent(notice));
  });

  test('when the password changes', async () => {
    const client = await look(owner, second);
    const agent = await signedIn(app, owner);
    const body = { currentPassword: owner.password, newPassword: 'a brand new password' };
    await agent.post('/api/account/password').send(body).expect(204);
    expect(await told(client)).toMatchObject(bye);
  });

  test('when the member is put out of the shop', async () => {
    const painter = await makeMember(app.owner, { id: owner.shopId }, { role: 'painter' });
    const client = await look(painter, second);
    const agent = await signedIn(app, owner);
    await agent.patch(`/api/shops/${owner.shopId}/members/${painter.memberId}`).send({ disabled: true }).expect(200);
    let event = await told(client);
    // What put it out may still be told before.
    if (event !== 'closed' && event.event === 'change') event = await told(client);
    expect(event).toMatchObject(bye);
    expect(await client.next()).toBe('closed');
  });

  test('and is not opened by who may not', async () => {
    const foreign = await makeMember(app.owner, await makeShop(app.owner), { role: 'owner' });
    expect((await look(foreign)).status).toBe(404);
    expect((await openLive(app, { shopId: owner.shopId, cookie: '' })).status).toBe(401);
  });
});

test('one account holds thirty streams and no more', async () => {
  const cookie = await cookieOf(owner);
  for (let stream = 0; stream < 30; stream += 1) await look(owner, app, null, cookie);
  const refused = await openLive(app, { shopId: owner.shopId, cookie });
  expect(refused.status).toBe(429);
  expect(refused.headers['retry-after']).toBe('60');
  opened.pop()?.close();
  await eventually(
    async () => {
      const again = await openLive(app, { shopId: owner.shopId, cookie });
      opened.push(again);
      return again.status;
    },
    (status) => status === 200,
  );
});
