import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { startLocalMail } from '#server/mail/local-mail.ts';
import { makeMailer } from '#server/mail/mailer.ts';
import { signedIn, stranger, testApp, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop } from '../helpers/factories.ts';

let database: TestDatabase;
let folder: string;
let web: string;
let app: TestApp;
let mail: Awaited<ReturnType<typeof startLocalMail>>;
beforeAll(async () => {
  database = await freshDatabase();
  folder = mkdtempSync(path.join(tmpdir(), 'ovenbird-mail-'));
  web = mkdtempSync(path.join(tmpdir(), 'ovenbird-web-'));
  mail = await startLocalMail({ folder, port: 0 });
  app = await testApp(database, { env: { DEV_MAILBOX_DIR: folder, WEB_ROOT: web } });
});
afterAll(async () => {
  await mail.close();
  await app.close();
  await database.drop();
  for (const made of [folder, web]) rmSync(made, { recursive: true });
});

describe('the local mailbox', () => {
  test('keeps letters whole, lists the newest first and shows one', async () => {
    expect((await stranger(app).get('/api/mailbox').expect(200)).body).toEqual({ letters: [] });
    const mailer = makeMailer(app.deps.config, `smtp://127.0.0.1:${mail.port}`);
    for (const subject of ['First', 'Second: größer'])
      await mailer.send('pat@shop.test', subject.slice(0, 5), { subject, text: 'Hello', html: '<p>Hello</p>' });
    const { letters } = (await stranger(app).get('/api/mailbox').expect(200)).body as {
      letters: { id: string; subject: string }[];
    };
    expect(letters).toMatchObject([
      { subject: 'Second: größer', to: 'pat@shop.test', messageId: '<Secon@ovenbird.test>' },
      { subject: 'First' },
    ]);
    const one = await stranger(app).get(`/api/mailbox/${letters[0]?.id}`).expect(200);
    expect(one.body).toMatchObject({ ...letters[0], text: expect.stringContaining('Hello') });
    expect(one.body.html).toContain('<p>Hello</p>');
    expect(readdirSync(folder).filter((file) => file.endsWith('.part'))).toEqual([]);
  });

  test.each(['none', '..%2Fsecret', 'secret.txt', '%2e%2e%2fetc%2fpasswd', 'x'.repeat(81)])(
    'has no letter %s and shows no other file',
    async (id) => {
      writeFileSync(path.join(folder, 'secret.txt'), 'no letter');
      const answer = await stranger(app).get(`/api/mailbox/${id}`);
      expect(answer.status).toBe(404);
      expect(answer.text).not.toContain('no letter');
    },
  );

  test('is not there for who does not sit at this machine, nor where mail is sent for real', async () => {
    const proxied = await testApp(database, { env: { DEV_MAILBOX_DIR: folder, BEHIND_PROXY: 'true' } });
    await stranger(proxied).get('/api/mailbox').set('X-Forwarded-For', '192.0.2.1').expect(404);
    await proxied.close();
    const real = await testApp(database);
    await stranger(real).get('/api/mailbox').expect(404);
    const owner = await makeMember(app.owner, await makeShop(app.owner), { role: 'owner' });
    expect((await (await signedIn(real, owner)).get('/api/session')).body.localMailbox).toBe(false);
    expect((await (await signedIn(app, owner)).get('/api/session')).body.localMailbox).toBe(true);
    await real.close();
  });
});

describe('the pages', () => {
  test('are not there until they are built', async () => {
    expect((await stranger(app).get('/day').expect(404)).body).toEqual({ error: { code: 'not-found' } });
  });

  test('index.html carries the nonce of its own answer at every address of the app, and is not kept', async () => {
    writeFileSync(path.join(web, 'index.html'), '<meta name="csp-nonce" content="__CSP_NONCE__" />');
    for (const address of ['/', '/day', '/jobs/12?sort=title', '/index.html']) {
      const page = await stranger(app).get(address).expect(200);
      const nonce = /content="([^"]+)"/.exec(page.text)?.[1];
      expect(page.headers['content-security-policy']).toContain(`'nonce-${nonce}'`);
      expect(page.headers['cache-control']).toBe('no-store');
      expect(page.headers['content-type']).toBe('text/html; charset=utf-8');
    }
  });

  test('what carries a hash in its name is kept for a year; a missing one is no page', async () => {
    rmSync(path.join(web, 'assets'), { recursive: true, force: true });
    mkdirSync(path.join(web, 'assets'));
    writeFileSync(path.join(web, 'assets', 'app-abc123.js'), 'export {};');
    const asset = await stranger(app).get('/assets/app-abc123.js').expect(200);
    expect(asset.headers['cache-control']).toBe('public, max-age=31536000, immutable');
    const missing = await stranger(app).get('/assets/app-gone.js').expect(404);
    expect(missing.body).toEqual({ error: { code: 'not-found' } });
  });

  test.each(['/.git/config', '/..%2f..%2fetc/passwd', '/.env'])('%s shows no file', async (address) => {
    writeFileSync(path.join(web, '.env'), 'SECRET=1');
    const answer = await stranger(app).get(address);
    expect(answer.text).not.toMatch(/SECRET=1|root:|\[core\]/);
  });
});
