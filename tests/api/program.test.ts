import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { createServer, type AddressInfo } from 'node:net';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { signedIn, testApp, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop, type MadeMember } from '../helpers/factories.ts';
import { openLive } from '../helpers/live.ts';
import { eventually } from '../helpers/worker.ts';

let database: TestDatabase;
let app: TestApp;
let owner: MadeMember;
const running = new Set<ChildProcess>();
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
  owner = await makeMember(app.owner, await makeShop(app.owner), { role: 'owner' });
});
afterEach(() => {
  for (const program of running) program.kill('SIGKILL');
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

function start(env: Record<string, string>, entry = 'server/main.ts') {
  const program = spawn(process.execPath, ['--import', 'tsx', entry], {
    stdio: ['ignore', 'pipe', 'pipe'],
    env: { PATH: process.env['PATH'], ...env },
  });
  running.add(program);
  program.once('exit', () => running.delete(program));
  let said = '';
  let complained = '';
  program.stdout.on('data', (chunk: Buffer) => (said += chunk.toString()));
  program.stderr.on('data', (chunk: Buffer) => (complained += chunk.toString()));
  const ended = once(program, 'exit').then(([code]) => ({ code: code as number | null, said, complained }));
  return { program, ended, said: () => said };
}

async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as AddressInfo;
  await new Promise((done) => server.close(done));
  return port;
}

const good = async (): Promise<Record<string, string>> => ({
  NODE_ENV: 'production',
  HOST: '127.0.0.1',
  PORT: String(await freePort()),
  DATABASE_URL: database.url,
  SESSION_SECRET: 'a secret for tests only, 32 characters or more',
  LOG_LEVEL: 'info',
});

const answers = (url: string) =>
  fetch(url).then(
    (answer) => answer.status,
    () => 0,
  );

describe('the web server', () => {
  test('names every setting that is wrong, in one line, and does not start', async () => {
    const env = { PORT: 'eighty', SESSION_SECRET: 'short', DATABASE_URL: 'mysql://elsewhere', SMTP_URL: 'http://mail' };
    const { code, complained } = await start(env).ended;
    expect(code).toBe(1);
    expect(complained.trim().split('\n')).toHaveLength(1);
    for (const name of Object.keys(env)) expect(complained).toContain(`${name}:`);
  });

  test('says in one line that its port is taken', async () => {
    const taken = createServer().listen(0, '127.0.0.1');
    await once(taken, 'listening');
    const { port } = taken.address() as AddressInfo;
    const { code, complained } = await start({ ...(await good()), PORT: String(port) }).ended;
    expect(code).toBe(1);
    expect(complained.trim()).toBe(`Port ${port} of 127.0.0.1 is taken. Stop the program that uses it, or set PORT.`);
    taken.close();
  });

  test('stops when told: answers what is under way, ends streams with a word, and exits 0', async () => {
    const env = await good();
    const { program, ended, said } = start(env);
    const url = `http://127.0.0.1:${env['PORT']}`;
    await eventually(
      () => answers(`${url}/api/ready`),
      (status) => status === 200,
    );
    const there = { ...app, url };
    const agent = await signedIn(there, owner);
    const { email, password } = owner;
    const cookie = await cookieFrom(url, { email, password });
    const streams = await Promise.all(
      Array.from({ length: 20 }, () => openLive(there, { shopId: owner.shopId, cookie })),
    );
    // Waits for the shop's row, which is held here until the server has been told to stop.
    const holding = await app.owner.transaction();
    await holding('shop').where({ id: owner.shopId }).forUpdate().first('id');
    const underWay = agent
      .post(`/api/shops/${owner.shopId}/invitations`)
      .send({ email: 'new@shop.test', role: 'painter', personId: null })
      .then((answer) => answer.status);
    const waiting = () =>
      app.owner('pg_stat_activity').where({ wait_event_type: 'Lock' }).andWhereRaw('datname = current_database()');
    await eventually(
      async () => waiting(),
      (rows) => rows.length > 0,
    );
    program.kill('SIGTERM');
    await eventually(
      () => answers(`${url}/api/health`),
      (status) => status === 0,
    );
    await holding.commit();
    expect(await underWay).toBe(200);
    for (const stream of streams) expect(await stream.next()).toBe('closed');
    expect((await ended).code).toBe(0);
    for (const line of said().trim().split('\n')) expect(() => void JSON.parse(line)).not.toThrow();
    for (const secret of [password, cookie.split('=')[1] ?? 'none', env['SESSION_SECRET'] ?? 'none'])
      expect(said()).not.toContain(secret);
  });
});

async function cookieFrom(url: string, body: object): Promise<string> {
  const answer = await fetch(`${url}/api/session`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify(body),
  });
  return answer.headers.getSetCookie()[0]?.split(';', 1)[0] ?? '';
}

describe('the helpers beside it', () => {
  test('migrations say what is wrong, and change nothing where all is done', async () => {
    const bad = await start({ DATABASE_URL: 'postgres://127.0.0.1:1/none' }, 'server/migrate-main.ts').ended;
    expect(bad.code).toBe(1);
    expect(bad.complained).toMatch(/^The database cannot be brought up to date: .*ECONNREFUSED/);
    const none = await start({}, 'server/migrate-main.ts').ended;
    expect(none.complained).toMatch(/DATABASE_OWNER_URL or DATABASE_URL must name/);
    const done = await start({ DATABASE_OWNER_URL: database.ownerUrl }, 'server/migrate-main.ts').ended;
    expect(done).toMatchObject({ code: 0, complained: '' });
  });
});
