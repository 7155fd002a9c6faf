import { once } from 'node:events';
import { request as httpRequest } from 'node:http';
import { Writable } from 'node:stream';
import express from 'express';
import { pino } from 'pino';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { createApp } from '#server/app.ts';
import { connect } from '#server/db/connect.ts';
import { requestLog } from '#server/http/request-log.ts';
import { errorHandler } from '#server/http/error-handler.ts';
import { signedIn, stranger, testApp, testDeps, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop, type MadeMember } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
let owner: MadeMember;
let agent: Agent;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
  owner = await makeMember(app.owner, await makeShop(app.owner), { role: 'owner' });
  agent = await signedIn(app, owner);
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

const paths = createApp(
  testDeps({ ownerUrl: '', url: 'postgres://127.0.0.1:1/none', drop: async () => {} }).deps,
).routes.map(({ method, path }) => [method, path.replace(/:\w+/g, '0190a0a0-0000-7000-8000-000000000001')] as const);

const send = (method: string, path: string) => {
  const verb = method.toLowerCase() as 'get' | 'post' | 'patch' | 'delete';
  return agent[verb](path);
};

describe('other sites', () => {
  // Loggers send readings with a key of their own; a cookie opens nothing there (see api-keys.test.ts).
  const writes = paths.filter(([method, path]) => method !== 'GET' && path !== '/api/readings');
  test.each(writes)('cannot %s %s with a cookie of ours', async (method, path) => {
    for (const site of ['cross-site', 'same-site', 'none']) {
      const answer = await send(method, path).set('Sec-Fetch-Site', site).send({}).expect(403);
      expect(answer.body).toEqual({ error: { code: 'cross-site' } });
    }
    await send(method, path).set('Origin', 'https://elsewhere.test').send({}).expect(403);
    await send(method, path).set('Origin', 'null').send({}).expect(403);
  });

  test('a cookie of ours is no key for readings', async () => {
    await send('POST', '/api/readings').set('Sec-Fetch-Site', 'cross-site').send({}).expect(401);
    await send('POST', '/api/readings').set('Origin', app.url).send({}).expect(401);
  });

  test('our own pages can, whether or not the browser sends Sec-Fetch-Site', async () => {
    const change = () => agent.patch('/api/account').send({ clock: '24' });
    await change().set('Sec-Fetch-Site', 'same-origin').set('Origin', app.url).expect(200);
    await change().set('Origin', app.url).expect(200);
    await change().expect(200);
  });

  test.each(['text/plain', 'application/x-www-form-urlencoded', 'multipart/form-data', 'application/jsonp'])(
    'a body of kind %s, as a form could send it, is refused',
    async (type) => {
      const answer = await agent.patch('/api/account').set('Content-Type', type).send('{"clock":"12"}').expect(400);
      expect(answer.body.error.fields).toEqual([{ path: 'headers.content-type', message: 'must be application/json' }]);
    },
  );

  test('are told nothing of who may read from elsewhere', async () => {
    const answer = await agent.get('/api/session').set('Origin', 'https://elsewhere.test');
    expect(Object.keys(answer.headers).filter((name) => name.startsWith('access-control'))).toEqual([]);
  });
});

describe('headers', () => {
  const gets = paths.filter(([, path]) => !path.endsWith('/live'));
  test.each([...gets, ['GET', '/api/nothing-here'], ['GET', '/'], ['GET', '/assets/none.js']] as const)(
    'of %s %s',
    async (method, path) => {
      const { headers } = await send(method, path);
      expect(headers).toMatchObject({
        'x-content-type-options': 'nosniff',
        'referrer-policy': 'no-referrer',
        'cross-origin-opener-policy': 'same-origin',
        'cross-origin-resource-policy': 'same-origin',
        'x-frame-options': 'DENY',
      });
      expect(headers['content-security-policy']).toMatch(
        /^default-src 'self';script-src 'self';style-src 'self' 'nonce-[A-Za-z0-9+/]{22}==';img-src 'self' data: blob:;font-src 'self' data:;connect-src 'self';worker-src 'self';manifest-src 'self';object-src 'none';base-uri 'none';frame-ancestors 'none';form-action 'self'$/,
      );
      expect(headers['x-request-id']).toMatch(/^[0-9a-f-]{36}$/);
      expect(headers['x-powered-by']).toBeUndefined();
      // Over plain http it would lock people out of a shop's own machine.
      expect(headers['strict-transport-security']).toBeUndefined();
      if (path.startsWith('/api/')) expect(headers['cache-control']).toBe('no-store');
      if (headers['content-length'] !== '0' && headers['content-type'] !== undefined)
        expect(headers['content-type']).toMatch(/; charset=utf-8$/);
    },
  );

  test('over https: a year of it, sub-domains too', async () => {
    const secure = await testApp(database, { env: { PUBLIC_URL: 'https://ovenbird.test' } });
    const { headers } = await stranger(secure).get('/api/health');
    expect(headers['strict-transport-security']).toBe('max-age=31536000; includeSubDomains');
    await secure.close();
  });

  test('each answer has a number and a nonce of its own, whatever the request says', async () => {
    const [one, two] = [await agent.get('/').set('X-Request-Id', 'mine'), await agent.get('/')];
    expect(one.headers['x-request-id']).not.toBe('mine');
    expect(one.headers['content-security-policy']).not.toBe(two.headers['content-security-policy']);
  });
});

describe('bad requests', () => {
  // Signing out was among the routes above.
  beforeAll(async () => {
    agent = await signedIn(app, owner);
  });

  test.each([
    ['no JSON', '{"email":', 400],
    ['no object', '"text"', 400],
    ['a field that is not ours', '{"clock":"24","__proto__":{"admin":true}}', 400],
    ['a megabyte and a byte', `{"name":"${'x'.repeat(1_048_577 - 11)}"}`, 413],
    ['ten megabytes', `{"name":"${'x'.repeat(10_485_760)}"}`, 413],
  ])('%s is refused with our own body', async (_what, body, status) => {
    const answer = await agent.patch('/api/account').set('Content-Type', 'application/json').send(body).expect(status);
    expect(answer.body.error.code).toBe(status === 413 ? 'too-large' : 'bad-request');
  });

  test('ten megabytes in pieces, of which nobody said how long they are', async () => {
    const { port } = new URL(app.url);
    const status = await new Promise<number | undefined>((resolve, reject) => {
      const headers = { 'Content-Type': 'application/json', 'Transfer-Encoding': 'chunked' };
      const sent = httpRequest({ host: '127.0.0.1', port, path: '/api/session', method: 'POST', headers }, (answer) => {
        answer.resume();
        resolve(answer.statusCode);
        sent.destroy();
      });
      sent.on('error', (error: NodeJS.ErrnoException) => error.code !== 'ECONNRESET' && reject(error));
      sent.write('{"email":"');
      for (let piece = 0; piece < 10; piece += 1) sent.write('x'.repeat(1_048_576));
      sent.end();
    });
    expect(status).toBe(413);
  });

  test('text that no column can hold is the sender’s fault, not ours', async () => {
    const answer = await agent.patch('/api/account').send({ name: 'a\u0000b' }).expect(400);
    expect(answer.body.error.code).toBe('bad-request');
  });

  test('an address that is none of ours, and a half-written one', async () => {
    expect((await agent.get('/api/nothing-here').expect(404)).body).toEqual({ error: { code: 'not-found' } });
    expect((await agent.post('/nothing-here').send({}).expect(404)).body).toEqual({ error: { code: 'not-found' } });
    expect((await agent.get('/api/mailbox/%E0%A4%A').expect(400)).body.error.code).toBe('bad-request');
    await agent.get('/assets/none.js').expect(404);
  });
});

describe('when something breaks', () => {
  /** A small server that fails in one way, with the product's log and last resort. */
  async function failing(error: unknown) {
    const lines: string[] = [];
    const sink = new Writable({
      write: (chunk: Buffer, _encoding, done) => {
        lines.push(chunk.toString());
        done();
      },
    });
    const broken = express();
    broken.use(requestLog(pino({ level: 'info' }, sink)));
    broken.get('/', () => {
      throw error;
    });
    broken.use(errorHandler);
    const server = broken.listen(0, '127.0.0.1');
    await once(server, 'listening');
    const { port } = server.address() as { port: number };
    const answer = await request(`http://127.0.0.1:${port}`).get('/?token=secret-in-query').set('Cookie', 'sid=secret');
    await new Promise((done) => server.close(done));
    return { answer, log: lines.join('') };
  }

  test('what we did not expect is told to the log and to nobody else', async () => {
    const { answer, log } = await failing(new Error('password of the database is hunter2'));
    expect(answer.status).toBe(500);
    expect(answer.body).toEqual({ error: { code: 'internal', requestId: answer.headers['x-request-id'] } });
    expect(log).toContain('hunter2');
    expect(log).toContain(answer.headers['x-request-id']);
    expect(log).not.toContain('secret');
  });

  // PostgreSQL manual, appendix A.
  test.each([
    ['23P01', 409, 'taken'],
    ['40P01', 409, 'taken'],
    ['40001', 409, 'taken'],
    ['23505', 409, 'taken'],
    ['57P01', 503, 'unavailable'],
    ['53300', 503, 'unavailable'],
    ['08006', 503, 'unavailable'],
    ['ECONNREFUSED', 503, 'unavailable'],
    ['22021', 400, 'bad-request'],
    ['42703', 500, 'internal'],
  ])('the database says %s: %i %s', async (code, status, told) => {
    const { answer } = await failing(Object.assign(new Error('of the database'), { code }));
    expect(answer.status).toBe(status);
    expect(answer.body.error.code).toBe(told);
    expect(answer.headers['retry-after']).toBe(status === 503 ? '2' : undefined);
  });

  test('a database out of reach is 503 and does not hang; health says so', async () => {
    const lost = await testApp(database, {
      env: { DATABASE_URL: 'postgres://ovenbird_app@127.0.0.1:1/none' },
      deps: { db: connect('postgres://ovenbird_app@127.0.0.1:1/none', 2) },
    });
    const body = { email: owner.email, password: owner.password };
    const answers = await Promise.all([
      stranger(lost).get('/api/health'),
      stranger(lost).get('/api/ready'),
      stranger(lost).post('/api/session').send(body),
    ]);
    for (const answer of answers) {
      expect(answer.status).toBe(503);
      expect(answer.body.error.code).toBe('unavailable');
      expect(answer.headers['retry-after']).toBe('2');
    }
    await lost.close();
  });

  test('a pool that is all taken is 503, and works again once it is not', async () => {
    const narrow = await testApp(database, { deps: { db: connect(database.url, 1) } });
    const holding = await narrow.deps.db.transaction();
    const busy = await stranger(narrow).get('/api/health').expect(503);
    expect(busy.body.error.code).toBe('unavailable');
    await holding.rollback();
    await stranger(narrow).get('/api/health').expect(200, { status: 'ok' });
    await narrow.close();
  });
});
