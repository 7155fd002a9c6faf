import express, { Router, type Express } from 'express';
import type { Deps } from './deps.ts';
import { notFound } from './errors.ts';
import { openPlainPool } from './db/plain-pool.ts';
import { refuseOtherSites } from './http/csrf.ts';
import { errorHandler } from './http/error-handler.ts';
import { benchRoutes } from './http/bench.ts';
import { dayRoutes } from './http/day.ts';
import { healthRoutes } from './http/health.ts';
import { jobRoutes } from './http/jobs.ts';
import { makePassport, readAccount } from './http/passport.ts';
import { requestLog } from './http/request-log.ts';
import { Routes, type Route } from './http/route.ts';
import { neverStore, securityHeaders } from './http/security.ts';
import { sessionRoutes } from './http/session.ts';
import { sheetRoutes } from './http/sheets.ts';
import { useRoutes } from './http/use.ts';
import { sessionStore, sessionTimeouts } from './http/session-store.ts';

/** The nouns of the interface, each a list of routes of its own. A new noun is one line here. */
const nouns: ((routes: Routes, deps: Deps) => void)[] = [jobRoutes, sheetRoutes, dayRoutes, benchRoutes, useRoutes];

export type App = {
  app: Express;
  routes: readonly Route[];
  /** Lets go of the connections it opened itself; what is in `deps` belongs to who made it. */
  close(): Promise<void>;
};

const bodyLimit = 1_048_576;

export function createApp(deps: Deps): App {
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', deps.config.BEHIND_PROXY ? 1 : false);
  app.use(requestLog(deps.log), ...securityHeaders(deps.config));

  const router = Router({ caseSensitive: true });
  const routes = new Routes(router, deps);
  const pool = openPlainPool(deps.config.DATABASE_URL, 4, (error) => deps.log.warn({ err: error }, 'connection lost'));
  const passport = makePassport(deps);

  router.use('/api', neverStore);
  healthRoutes(routes, deps, () => true);
  router.use('/api', refuseOtherSites, express.json({ limit: bodyLimit, inflate: false }));
  router.use('/api', sessionStore(deps, pool), sessionTimeouts(deps), readAccount(passport));
  sessionRoutes(routes, deps, passport);
  for (const noun of nouns) noun(routes, deps);
  router.use('/api', () => {
    throw notFound();
  });

  app.use(router, errorHandler);
  return { app, routes: routes.list, close: () => pool.end() };
}
