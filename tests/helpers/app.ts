import { once } from 'node:events';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { Knex } from 'knex';
import knexFactory from 'knex';
import { pino } from 'pino';
import request from 'supertest';
import type TestAgent from 'supertest/lib/agent.js';
import { createApp, type App } from '#server/app.ts';
import { readConfig } from '#server/config.ts';
import { connect } from '#server/db/connect.ts';
import type { Deps } from '#server/deps.ts';
import type { TestDatabase } from './database.ts';
import { tempStorage } from './storage.ts';

/** Hashing that costs nothing; what it costs in the product is tested in tests/api/passwords.test.ts. */
export const cheapHashing = { memoryCost: 64, timeCost: 1, parallelism: 1 };

export type TestApp = {
  /** Where it listens: http://127.0.0.1:PORT */
  url: string;
  routes: App['routes'];
  deps: Deps;
  /** As the owner of the tables, past row level security: to put in and look at rows. */
  owner: Knex;
  /** What `deps.now()` says; stands still until moved. */
  clock: { now: Date; advance(milliseconds: number): void };
  close(): Promise<void>;
};

export type TestAppOptions = { now?: Date; env?: Record<string, string>; deps?: Partial<Deps> };

/** A Tuesday, 08:00 in most of the shops' zones; fixed, so that what depends on it can be written down. */
export const fixedNow = new Date('2026-03-10T13:00:00Z');

export function testDeps(database: TestDatabase, options: TestAppOptions = {}) {
  const clock = {
    now: options.now ?? fixedNow,
    advance(milliseconds: number) {
      clock.now = new Date(clock.now.getTime() + milliseconds);
    },
  };
  const deps: Deps = {
    config: readConfig({
      NODE_ENV: 'test',
      DATABASE_URL: database.url,
      SESSION_SECRET: 'a secret for tests only, 32 characters or more',
      PUBLIC_URL: 'http://ovenbird.test',
      ...options.env,
    }),
    db: connect(database.url, 8),
    log: pino({ level: 'silent' }),
    now: () => clock.now,
    storage: tempStorage(),
    passwordCost: cheapHashing,
    ...options.deps,
  };
  return { deps, clock };
}

/** The whole server on a port of the loopback, with a fixed clock and cheap password hashing. */
export async function testApp(database: TestDatabase, options: TestAppOptions = {}): Promise<TestApp> {
  const { deps, clock } = testDeps(database, options);
  const owner = knexFactory({ client: 'pg', connection: database.ownerUrl, pool: { min: 0, max: 4 } });
  const app = createApp(deps);
  const server = createServer(app.app).listen(0, '127.0.0.1');
  await once(server, 'listening');
  const close = async () => {
    await app.close();
    server.closeAllConnections();
    server.close();
    await Promise.all([deps.db.destroy(), owner.destroy()]);
  };
  const { port } = server.address() as AddressInfo;
  return { url: `http://127.0.0.1:${port}`, routes: app.routes, deps, owner, clock, close };
}

export type Agent = TestAgent;

/** A browser that nobody has signed in with. */
export const stranger = (app: TestApp): Agent => request.agent(app.url);

/** A browser in which this account is signed in; keeps its cookie. */
export async function signedIn(app: TestApp, account: { email: string; password: string }): Promise<Agent> {
  const agent = stranger(app);
  const { email, password } = account;
  await agent.post('/api/session').send({ email, password }).expect(200);
  return agent;
}
