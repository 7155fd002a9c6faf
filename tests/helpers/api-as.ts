import express, { type RequestHandler } from 'express';
import { pino } from 'pino';
import request, { type Agent } from 'supertest';
import { readConfig } from '#server/config.ts';
import { connect } from '#server/db/connect.ts';
import type { Deps } from '#server/deps.ts';
import { errorHandler } from '#server/http/error-handler.ts';
import { Routes } from '#server/http/route.ts';
import { freshDatabase } from './database.ts';
import { tempStorage } from './storage.ts';

/** Routes on a database of their own, with a clock that stands still until it is set. Sessions are tested elsewhere. */
export type TestApi = {
  deps: Deps;
  setClock(now: string): void;
  /** Requests of an account, as if it had signed in. */
  as(accountId: string): Agent;
  close(): Promise<void>;
};

export async function testApi(register: (routes: Routes, deps: Deps) => void, now: string): Promise<TestApi> {
  const database = await freshDatabase();
  let clock = new Date(now);
  const deps: Deps = {
    config: readConfig({ NODE_ENV: 'test', DATABASE_URL: database.url, SESSION_SECRET: 'x'.repeat(32) }),
    db: connect(database.url, 6),
    log: pino({ level: 'silent' }),
    now: () => clock,
    storage: tempStorage(),
  };
  const app = express();
  app.use(express.json({ limit: 1_048_576 }), actingAccount(deps));
  register(new Routes(app, deps), deps);
  app.use(errorHandler);
  return {
    deps,
    setClock: (time) => {
      clock = new Date(time);
    },
    as: (accountId) => request.agent(app).set('x-test-account', accountId),
    close: async () => {
      await deps.db.destroy();
      await database.drop();
    },
  };
}

const actingAccount =
  (deps: Deps): RequestHandler =>
  (req, _res, next) => {
    req.log = deps.log;
    const id = req.get('x-test-account');
    Object.assign(req, { user: id === undefined ? undefined : { id } });
    next();
  };
