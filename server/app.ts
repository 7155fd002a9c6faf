import express, { Router, type Express } from 'express';
import { openPlainPool } from './db/plain-pool.ts';
import type { Deps } from './deps.ts';
import { notFound } from './errors.ts';
import { airRoutes } from './http/air.ts';
import { apiKeyRoutes } from './http/api-keys.ts';
import { attachmentRoutes } from './http/attachments.ts';
import { benchRoutes } from './http/bench.ts';
import { coatingRoutes } from './http/coatings.ts';
import { refuseOtherSites } from './http/csrf.ts';
import { dayRoutes } from './http/day.ts';
import { draftRoutes } from './http/drafts.ts';
import { errorHandler } from './http/error-handler.ts';
import { firstStepRoutes } from './http/first-steps.ts';
import { healthRoutes } from './http/health.ts';
import { hoursRoutes } from './http/hours.ts';
import { jobRoutes } from './http/jobs.ts';
import { makeLimits } from './http/limits.ts';
import { linkRoutes } from './http/links.ts';
import { liveRoutes } from './http/live.ts';
import { mailboxRoutes } from './http/mailbox.ts';
import { memberRoutes } from './http/members.ts';
import { pages } from './http/pages.ts';
import { lampRoutes, placeRoutes } from './http/places.ts';
import { peopleRoutes } from './http/people.ts';
import { makePassport, readAccount } from './http/passport.ts';
import { readingsDoor } from './http/readings-door.ts';
import { requestLog } from './http/request-log.ts';
import { Routes, type Route } from './http/route.ts';
import { neverStore, securityHeaders } from './http/security.ts';
import { sessionRoutes } from './http/session.ts';
import { sessionStore, sessionTimeouts } from './http/session-store.ts';
import { shopRoutes } from './http/shop-settings.ts';
import { openShopRoutes } from './http/shops.ts';
import { signUpRoutes } from './http/sign-up.ts';
import { sheetRoutes } from './http/sheets.ts';
import { upkeepRoutes } from './http/upkeep.ts';
import { traceRoutes } from './http/traces.ts';
import { useRoutes } from './http/use.ts';
import { makeHub } from './realtime/hub.ts';

/** The nouns of the interface, each a list of routes of its own. A new noun is one line here. */
const nouns: ((routes: Routes, deps: Deps) => void)[] = [
  jobRoutes,
  sheetRoutes,
  coatingRoutes,
  attachmentRoutes,
  dayRoutes,
  draftRoutes,
  benchRoutes,
  useRoutes,
  mailboxRoutes,
  airRoutes,
  apiKeyRoutes,
  traceRoutes,
  peopleRoutes,
  firstStepRoutes,
  placeRoutes,
  lampRoutes,
  hoursRoutes,
  upkeepRoutes,
  shopRoutes,
];

export type App = {
  app: Express;
  routes: readonly Route[];
  /** Begins to hear of changes; says ready once it does. */
  start(): void;
  /** No longer ready, live streams end; requests under way are still answered. */
  drain(): Promise<void>;
  /** Lets go of the connections it opened itself; what is in `deps` belongs to who made it. */
  close(): Promise<void>;
};

const bodyLimit = 1_048_576;

export function createApp(deps: Deps): App {
  const { config, log } = deps;
  const router = Router({ caseSensitive: true });
  const routes = new Routes(router, deps);
  const pool = openPlainPool(config.DATABASE_URL, 4, (error) => log.warn({ err: error }, 'connection lost'));
  const passport = makePassport(deps);
  const limits = makeLimits(pool);
  const hub = makeHub(deps);

  router.use('/api', neverStore);
  healthRoutes(routes, deps, () => hub.isListening());
  readingsDoor(routes, router, deps, limits);
  router.use('/api', refuseOtherSites, express.json({ limit: bodyLimit, inflate: false }));
  router.use('/api', sessionStore(deps, pool), sessionTimeouts(deps), readAccount(passport));
  sessionRoutes(routes, deps, passport, limits);
  linkRoutes(routes, deps, limits);
  signUpRoutes(routes, deps, limits);
  memberRoutes(routes, deps, limits);
  openShopRoutes(routes, deps, limits);
  liveRoutes(routes, deps, hub);
  for (const noun of nouns) noun(routes, deps);
  router.use('/api', () => {
    throw notFound();
  });

  const app = express();
  app.disable('x-powered-by');
  // False, or who asks could claim any address; one hop where one proxy is known to stand in front.
  app.set('trust proxy', config.BEHIND_PROXY ? 1 : false);
  app.use(requestLog(log), ...securityHeaders(config), router, pages(config), errorHandler);
  return {
    app,
    routes: routes.list,
    start: () => hub.start(),
    drain: () => hub.close(),
    close: async () => {
      await hub.close();
      await pool.end();
    },
  };
}
