import { verify } from '@node-rs/argon2';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { signedIn, stranger, testApp, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop, type MadeMember } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
let shop: { id: string; timeZone: string };
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
  shop = await makeShop(app.owner, { name: 'North Street' });
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

const minute = 60_000;
const member = (): Promise<MadeMember> => makeMember(app.owner, shop, { role: 'lead' });
const cookieOf = (answer: { headers: Record<string, unknown> }): string => {
  const [first] = answer.headers['set-cookie'] as string[];
  if (first === undefined) throw new Error('no cookie was set');
  return first;
};
const sidOf = (cookie: string): string => /^ovenbird=s%3A([^.]+)\./.exec(cookie)?.[1] ?? 'none';
const signInAs = (someone: MadeMember) =>
  stranger(app).post('/api/session').send({ email: someone.email, password: someone.password });

describe('signing in', () => {
  test('answers with who it is and the shops they belong to', async () => {
    const lead = await member();
    const agent = await signedIn(app, lead);
    const me = await agent.get('/api/session').expect(200);
    expect(me.body.account).toMatchObject({ id: lead.accountId, email: lead.email, name: lead.name });
    expect(me.body.shops).toEqual([
      { id: shop.id, name: 'North Street', timeZone: shop.timeZone, role: 'lead', personId: null },
    ]);
    expect(me.body.serverTime).toBe(app.clock.now.toISOString());
    expect(me.body.localMailbox).toBe(false);
  });

  test('takes an address in any capitals', async () => {
    const lead = await member();
    const { password } = lead;
    await stranger(app).post('/api/session').send({ email: lead.email.toUpperCase(), password }).expect(200);
  });

  test('without a session nothing is told', async () => {
    const answer = await stranger(app).get('/api/session').expect(401);
    expect(answer.body).toEqual({ error: { code: 'not-signed-in' } });
  });

  test('an unknown address, a wrong password and a disabled account get the same answer', async () => {
    const lead = await member();
    const disabled = await member();
    await app.owner('account').where({ id: disabled.accountId }).update({ disabled_at: app.clock.now });
    const tries = [
      { email: 'nobody@shop.test', password: lead.password },
      { email: lead.email, password: 'not the password' },
      { email: disabled.email, password: disabled.password },
    ];
    const answers = await Promise.all(tries.map((body) => stranger(app).post('/api/session').send(body).expect(401)));
    expect(answers.map((answer) => answer.text)).toEqual(Array(3).fill('{"error":{"code":"wrong-credentials"}}'));
    expect(answers.map((answer) => answer.headers['set-cookie'])).toEqual([undefined, undefined, undefined]);
  });

  test('a hash that was made cheaper is made anew, one that was not is left', async () => {
    const dear = await testApp(database, { deps: { passwordCost: { memoryCost: 128, timeCost: 2, parallelism: 1 } } });
    const lead = await member();
    const stored = async () =>
      (await app.owner('account').where({ id: lead.accountId }).first<{ password_hash: string }>()).password_hash;
    const cheap = await stored();
    await signedIn(app, lead);
    expect(await stored()).toBe(cheap);
    await signedIn(dear, lead);
    expect(await stored()).toMatch(/^\$argon2id\$v=19\$m=128,t=2,p=1\$/);
    expect(await verify(await stored(), lead.password)).toBe(true);
    await dear.close();
  });
});

describe('the cookie', () => {
  test('is out of reach of scripts and of other sites, and holds 128 bits or more of chance', async () => {
    const cookie = cookieOf(await signInAs(await member()).expect(200));
    expect(cookie).toMatch(/; Path=\/; Expires=[^;]+; HttpOnly; SameSite=Lax$/);
    // uid-safe gives 24 bytes of the system's generator: 32 characters of base64.
    expect(sidOf(cookie)).toMatch(/^[A-Za-z0-9_-]{32}$/);
  });

  test('over https it is bound to this host and never sent in the open', async () => {
    const secure = await testApp(database, { env: { PUBLIC_URL: 'https://ovenbird.test' } });
    const { email, password } = await member();
    const answer = await stranger(secure)
      .post('/api/session')
      .set('X-Forwarded-Proto', 'https')
      .send({ email, password })
      .expect(200);
    expect(cookieOf(answer)).toMatch(/^__Host-ovenbird=.*; Path=\/; .*Secure; SameSite=Lax$/);
    expect(cookieOf(answer)).not.toContain('Domain');
    await secure.close();
  });

  test('one that was planted before signing in is worth nothing afterwards', async () => {
    const [attacker, victim] = [await member(), await member()];
    const planted = cookieOf(await signInAs(attacker).expect(200)).split(';', 1)[0] ?? '';
    const answer = await stranger(app)
      .post('/api/session')
      .set('Cookie', planted)
      .send({ email: victim.email, password: victim.password })
      .expect(200);
    expect(sidOf(cookieOf(answer))).not.toBe(sidOf(planted));
    await stranger(app).get('/api/session').set('Cookie', planted).expect(401);
  });
});

describe('a session ends', () => {
  test('after twelve hours without a request, and no sooner', async () => {
    const agent = await signedIn(app, await member());
    app.clock.advance(719 * minute);
    await agent.get('/api/session').expect(200);
    app.clock.advance(719 * minute);
    await agent.get('/api/session').expect(200);
    app.clock.advance(721 * minute);
    await agent.get('/api/session').expect(401);
  });

  test('after a week however much it is used', async () => {
    const agent = await signedIn(app, await member());
    for (let hour = 10; hour < 168; hour += 10) {
      app.clock.advance(600 * minute);
      await agent.get('/api/session').expect(200);
    }
    app.clock.advance(8 * 60 * minute + 1);
    await agent.get('/api/session').expect(401);
  });

  test('its use is noted at most once a minute', async () => {
    const lead = await member();
    const agent = await signedIn(app, lead);
    const seenAt = async () => {
      const row = await app
        .owner('session')
        .where({ account_id: lead.accountId })
        .first<{ sess: { seenAt: number } }>();
      return row.sess.seenAt;
    };
    const first = app.clock.now.getTime();
    app.clock.advance(50_000);
    await agent.get('/api/session').expect(200);
    expect(await seenAt()).toBe(first);
    app.clock.advance(20_000);
    await agent.get('/api/session').expect(200);
    expect(await seenAt()).toBe(first + 70_000);
  });

  test('on signing out, on the server too; twice is once', async () => {
    const lead = await member();
    const cookie = cookieOf(await signInAs(lead).expect(200)).split(';', 1)[0] ?? '';
    const answer = await stranger(app).delete('/api/session').set('Cookie', cookie).expect(204);
    expect(answer.headers['clear-site-data']).toBe('"storage"');
    expect(cookieOf(answer)).toMatch(/^ovenbird=; Path=\/; Expires=Thu, 01 Jan 1970/);
    await stranger(app).get('/api/session').set('Cookie', cookie).expect(401);
    await stranger(app).delete('/api/session').set('Cookie', cookie).expect(204);
    expect(await app.owner('session').where({ account_id: lead.accountId })).toEqual([]);
  });

  test('a request under way does not bring back a session that was ended meanwhile', async () => {
    const lead = await member();
    const agent = await signedIn(app, lead);
    app.clock.advance(2 * minute);
    await Promise.all([
      agent.get('/api/session'),
      agent.get('/api/session'),
      app.owner('session').where({ account_id: lead.accountId }).delete(),
      agent.get('/api/session'),
    ]);
    await agent.get('/api/session').expect(401);
  });

  test('at once when the account is disabled', async () => {
    const lead = await member();
    const agent = await signedIn(app, lead);
    await app.owner('account').where({ id: lead.accountId }).update({ disabled_at: app.clock.now });
    await agent.get('/api/session').expect(401);
  });
});

describe('the account', () => {
  test('changes name, unit and clock, each alone', async () => {
    const agent = await signedIn(app, await member());
    await agent.patch('/api/account').send({ name: '  Ada  ' }).expect(200);
    await agent.patch('/api/account').send({ temperatureUnit: 'F' }).expect(200);
    const me = await agent.patch('/api/account').send({ clock: '12' }).expect(200);
    expect(me.body.account).toMatchObject({ name: 'Ada', temperatureUnit: 'F', clock: '12' });
    await agent.patch('/api/account').send({ email: 'other@shop.test' }).expect(400);
    await agent.patch('/api/account').send({}).expect(200);
  });

  test('a new password ends every other session and gives this one a new id', async () => {
    const lead = await member();
    const [here, there] = [await signedIn(app, lead), await signedIn(app, lead)];
    const given = { currentPassword: lead.password, newPassword: 'a longer and better one' };
    const wrong = await here
      .post('/api/account/password')
      .send({ ...given, currentPassword: 'no' })
      .expect(401);
    expect(wrong.body.error.code).toBe('wrong-credentials');
    const answer = await here.post('/api/account/password').send(given).expect(204);
    expect(sidOf(cookieOf(answer))).not.toBe('none');
    await here.get('/api/session').expect(200);
    await there.get('/api/session').expect(401);
    await signInAs(lead).expect(401);
    await signInAs({ ...lead, password: given.newPassword }).expect(200);
  });

  // NIST SP 800-63B-4, 3.1.1.2: length counts, long ones are taken whole, no rules of composition.
  test.each([
    ['nine char', 400],
    ['ten chars!', 204],
    ['aaaaaaaaaaaaaaa', 204],
    ['ein längeres Wort mit 🎨 und Leerzeichen', 204],
    ['x'.repeat(200), 204],
    ['x'.repeat(201), 400],
  ])('the new password %j is answered with %i', async (newPassword, status) => {
    const lead = await member();
    const agent = await signedIn(app, lead);
    await agent.post('/api/account/password').send({ currentPassword: lead.password, newPassword }).expect(status);
    if (status === 204) await signInAs({ ...lead, password: newPassword }).expect(200);
  });
});
