import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { signedIn, stranger, testApp, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makePerson, makeShop, type MadeMember } from '../helpers/factories.ts';
import { mailServer, tokenIn, type MailServer } from '../helpers/mail.ts';
import { eventually, startTestWorker } from '../helpers/worker.ts';

let database: TestDatabase;
let app: TestApp;
let mail: MailServer;
let stopWorker: () => Promise<void>;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database, { env: { BEHIND_PROXY: 'true' } });
  mail = await mailServer();
  stopWorker = startTestWorker(app.deps, mail.url);
});
afterAll(async () => {
  await stopWorker();
  await mail.close();
  await app.close();
  await database.drop();
});

const minute = 60_000;
const day = 24 * 60 * minute;

/** Every request from an address of its own: how many are allowed is tested in limits.test.ts. */
let asked = 0;
const post = (path: string, body: object) =>
  stranger(app)
    .post(path)
    .set('X-Forwarded-For', `198.51.100.${(asked += 1)}`)
    .send(body);

/** The letter that comes of doing this. */
async function letterOf(deed: () => PromiseLike<unknown>) {
  const before = mail.letters.length;
  await deed();
  await mail.took(before + 1);
  return mail.letters[before];
}

const shopWithOwner = async () =>
  makeMember(app.owner, await makeShop(app.owner, { name: 'North' }), { role: 'owner' });

describe('a forgotten password', () => {
  const ask = (email: string) => post('/api/password-reset', { email }).expect(204);
  const use = (token: string, password: string) => post('/api/password-reset/use', { token, password });
  const resetLetter = (email: string) => letterOf(() => ask(email));

  test('is replaced by a link that comes by mail, works once and ends all sessions', async () => {
    const owner = await shopWithOwner();
    const agent = await signedIn(app, owner);
    const letter = await resetLetter(owner.email.toUpperCase());
    expect(letter?.to).toMatchObject({ text: owner.email });
    expect(letter?.subject).toBe('Choose a new password');
    const token = tokenIn(letter);
    expect(letter?.text).toContain(`http://ovenbird.test/password-reset#${token}`);
    await use(token, 'a brand new password').expect(204);
    await agent.get('/api/session').expect(401);
    await post('/api/session', { email: owner.email, password: owner.password }).expect(401);
    await signedIn(app, { email: owner.email, password: 'a brand new password' });
    const again = await use(token, 'yet another password').expect(410);
    expect(again.body).toEqual({ error: { code: 'gone' } });
  });

  test('the link is good for half an hour', async () => {
    const owner = await shopWithOwner();
    const token = tokenIn(await resetLetter(owner.email));
    app.clock.advance(30 * minute);
    await use(token, 'a brand new password').expect(410);
  });

  test('using one link ends the others; two uses at the same time are one', async () => {
    const owner = await shopWithOwner();
    const first = tokenIn(await resetLetter(owner.email));
    app.clock.advance(minute);
    const second = tokenIn(await resetLetter(owner.email));
    expect(second).not.toBe(first);
    const both = await Promise.all([use(second, 'password number one'), use(second, 'password number two')]);
    expect(both.map((answer) => answer.status).sort()).toEqual([204, 410]);
    await use(first, 'password number three').expect(410);
  });

  test('holds 256 bits, and is kept nowhere but as a hash', async () => {
    const owner = await shopWithOwner();
    const token = tokenIn(await resetLetter(owner.email));
    expect(Buffer.from(token, 'base64url')).toHaveLength(32);
    const dump = await everyRow(app);
    expect(dump).toContain(owner.email);
    expect(dump).not.toContain(token);
    const hash = createHash('sha256').update(token).digest();
    expect(await app.owner('account_token').where({ token_hash: hash })).toHaveLength(1);
  });

  test('an address without an account gets the same answer and leaves the same traces, but no letter', async () => {
    const owner = await shopWithOwner();
    const tasks = async () => Number((await app.owner('task').count<{ count: number }[]>())[0]?.count);
    const before = [await tasks(), mail.letters.length];
    const unknown = await ask('nobody@shop.test');
    const known = await letterOf(() => ask(owner.email));
    expect(known?.to).toMatchObject({ text: owner.email });
    expect(unknown.text).toBe('');
    await eventually(
      () => app.owner('task').whereNull('done_at'),
      (open) => open.length === 0,
    );
    expect([await tasks(), mail.letters.length]).toEqual([(before[0] ?? 0) + 2, (before[1] ?? 0) + 1]);
  });

  test('of a disabled account stays: no letter, and an old link is void', async () => {
    const owner = await shopWithOwner();
    const token = tokenIn(await resetLetter(owner.email));
    await app.owner('account').where({ id: owner.accountId }).update({ disabled_at: app.clock.now });
    await use(token, 'a brand new password').expect(410);
    app.clock.advance(minute);
    await ask(owner.email);
    const open = () => app.owner('task').whereNull('done_at');
    await eventually(open, (tasks) => tasks.length === 0);
    expect(mail.letters.filter((letter) => (letter.to as { text: string }).text === owner.email)).toHaveLength(1);
  });

  test('asked for twice within a minute sends one letter', async () => {
    const owner = await shopWithOwner();
    await letterOf(() => Promise.all([ask(owner.email), ask(owner.email)]));
    await eventually(
      () => app.owner('task').whereNull('done_at'),
      (tasks) => tasks.length === 0,
    );
    expect(mail.letters.filter((letter) => (letter.to as { text: string }).text === owner.email)).toHaveLength(1);
  });

  test.each([['unknown-but-well-formed-token'], ['A'.repeat(43)]])('%s opens nothing', async (token) => {
    await use(token, 'a brand new password').expect(410);
  });
});

describe('an invitation', () => {
  let owner: MadeMember;
  let agent: Agent;
  let guests = 0;
  const newGuest = () => `guest${(guests += 1)}@shop.test`;
  beforeAll(async () => {
    owner = await shopWithOwner();
    agent = await signedIn(app, owner);
  });
  const invite = (email: string, more: object = {}) =>
    agent.post(`/api/shops/${owner.shopId}/invitations`).send({ email, role: 'painter', personId: null, ...more });
  const invitationLetter = (email: string, more: object = {}) => letterOf(() => invite(email, more).expect(200));
  const read = (token: string) => post('/api/invitation/read', { token });
  const accept = (token: string, password = 'a brand new password') =>
    post('/api/invitation/accept', { token, name: 'Guest', password });

  test('makes an account and a member of who never was here, and signs them in', async () => {
    const email = newGuest();
    const person = await makePerson(app.owner, { id: owner.shopId });
    const letter = await invitationLetter(email, { personId: person.id });
    expect(letter?.subject).toBe('North invites you to Ovenbird');
    const token = tokenIn(letter);
    const seen = await read(token).expect(200);
    expect(seen.body).toEqual({ shopName: 'North', email, role: 'painter', hasAccount: false });
    const me = await accept(token).expect(200);
    expect(me.body.account).toMatchObject({ email, name: 'Guest' });
    expect(me.body.shops).toMatchObject([{ id: owner.shopId, role: 'painter', personId: person.id }]);
    expect(me.headers['set-cookie']).toBeDefined();
    await read(token).expect(410);
    await accept(token).expect(410);
    await signedIn(app, { email, password: 'a brand new password' });
  });

  test('adds a shop to an account that is there, against its password', async () => {
    const other = await shopWithOwner();
    const token = tokenIn(await invitationLetter(other.email));
    expect((await read(token).expect(200)).body.hasAccount).toBe(true);
    const wrong = await accept(token, 'not their password').expect(401);
    expect(wrong.body.error.code).toBe('wrong-credentials');
    const me = await accept(token, other.password).expect(200);
    expect(me.body.account.name).toBe(other.name);
    const shops = me.body.shops as { id: string }[];
    expect(shops.map((shop) => shop.id).sort()).toEqual([other.shopId, owner.shopId].sort());
  });

  test('gives a new account the shop’s clock and units, and leaves those of an account that was there', async () => {
    await app.owner('shop').where({ id: owner.shopId }).update({ clock: '12', temperature_unit: 'F' });
    const guest = await accept(tokenIn(await invitationLetter(newGuest()))).expect(200);
    expect(guest.body.account).toMatchObject({ clock: '12', temperatureUnit: 'F' });
    const other = await shopWithOwner();
    const known = await accept(tokenIn(await invitationLetter(other.email)), other.password).expect(200);
    expect(known.body.account).toMatchObject({ clock: '24', temperatureUnit: 'C' });
  });

  test('is good for seven days', async () => {
    const token = tokenIn(await invitationLetter(newGuest()));
    app.clock.advance(7 * day - minute);
    await read(token).expect(200);
    app.clock.advance(minute);
    await read(token).expect(410);
    await accept(token).expect(410);
    agent = await signedIn(app, owner);
  });

  test('sent again replaces the one before; accepted twice at the same time is once', async () => {
    const email = newGuest();
    const first = tokenIn(await invitationLetter(email));
    const second = tokenIn(await invitationLetter(email, { role: 'office' }));
    await read(first).expect(410);
    const both = await Promise.all([accept(second), accept(second)]);
    expect(both.map((answer) => answer.status === 200)).toContain(true);
    expect(both.filter((answer) => answer.status === 200)).toHaveLength(1);
    const members = await agent.get(`/api/shops/${owner.shopId}/members`).expect(200);
    const made = (members.body.members as { email: string; role: string }[]).filter((one) => one.email === email);
    expect(made).toMatchObject([{ role: 'office' }]);
  });

  test('of somebody who is a member already, or for a person who is not of the shop, is refused', async () => {
    const member = await makeMember(app.owner, { id: owner.shopId }, { role: 'painter' });
    expect((await invite(member.email).expect(409)).body.error.code).toBe('taken');
    const stranger = await makePerson(app.owner, await makeShop(app.owner));
    const answer = await invite(newGuest(), { personId: stranger.id }).expect(400);
    expect(answer.body.error.fields[0].path).toBe('body.personId');
  });

  test.each(['x@shop.test\r\nBcc: all@shop.test', 'a@b', '"two" <x@shop.test>, y@shop.test'])(
    'to %j is refused, so that no header can be smuggled in',
    async (email) => {
      await invite(email).expect(400);
    },
  );

  test('brings back who was disabled, with the new role', async () => {
    const gone = await makeMember(app.owner, { id: owner.shopId }, { role: 'owner' });
    await app.owner('membership').where({ id: gone.memberId }).update({ disabled_at: app.clock.now });
    const me = await accept(tokenIn(await invitationLetter(gone.email)), gone.password).expect(200);
    expect(me.body.shops).toMatchObject([{ id: owner.shopId, role: 'painter' }]);
  });

  test('that was sent shows in the outbox, its link in no row', async () => {
    const email = newGuest();
    const token = tokenIn(await invitationLetter(email));
    const outbox = await eventually(
      () => agent.get(`/api/shops/${owner.shopId}/letters?state=sent`).expect(200),
      (answer) => (answer.body.letters as { to: string }[]).some((letter) => letter.to === email),
    );
    expect(outbox.body.letters[0]).toMatchObject({ kind: 'invitation', to: email, state: 'sent', lastError: null });
    expect(await everyRow(app)).not.toContain(token);
  });
});

/** All that the database holds of links, letters, tasks, accounts and sessions, as text. */
async function everyRow({ owner }: TestApp): Promise<string> {
  const tables = ['account_token', 'letter', 'task', 'account', 'session', 'change', 'idempotency'];
  const rows = await Promise.all(tables.map((table) => owner(table)));
  return JSON.stringify(rows);
}
