import connectPgSimple from 'connect-pg-simple';
import type { RequestHandler } from 'express';
import session from 'express-session';
import type { Config } from '../config.ts';
import type { Deps } from '../deps.ts';
import { touchSession } from '../services/touch-session.ts';

declare module 'express-session' {
  interface SessionData {
    /** Milliseconds since 1970, by the server's clock. */
    signedInAt: number;
    seenAt: number;
  }
}

export const isHttps = (config: Config): boolean => config.PUBLIC_URL.startsWith('https:');
/** A browser takes a __Host- cookie only over https, for this very host and every path. */
export const cookieName = (config: Config): string => (isHttps(config) ? '__Host-ovenbird' : 'ovenbird');

export const cookieKind = (config: Config) =>
  ({ path: '/', httpOnly: true, sameSite: 'lax', secure: isHttps(config) }) as const;

export type SessionPool = NonNullable<connectPgSimple.PGStoreOptions['pool']>;

/**
 * Sessions live in the database and are written once, at sign-in. Nothing writes the whole row later, so a request that
 * is still under way cannot bring back a session that was ended meanwhile.
 */
export function sessionStore(deps: Deps, pool: SessionPool): RequestHandler {
  const { config } = deps;
  const Store = connectPgSimple(session);
  return session({
    name: cookieName(config),
    secret: config.SESSION_SECRET,
    store: new Store({
      pool,
      tableName: 'session',
      createTableIfMissing: false,
      disableTouch: true,
      pruneSessionInterval: false,
    }),
    resave: false,
    saveUninitialized: false,
    proxy: isHttps(config) || config.BEHIND_PROXY,
    cookie: { ...cookieKind(config), maxAge: config.SESSION_ABSOLUTE_HOURS * 3_600_000 },
  });
}

const touchEvery = 60_000;

/** Ends a session that was idle or lasted too long, and notes at most once a minute that it is in use. */
export function sessionTimeouts(deps: Deps): RequestHandler {
  const idle = deps.config.SESSION_IDLE_MINUTES * 60_000;
  const absolute = deps.config.SESSION_ABSOLUTE_HOURS * 3_600_000;
  return async (req, _res, next) => {
    const { signedInAt, seenAt } = req.session;
    if (signedInAt === undefined || seenAt === undefined) return next();
    const now = deps.now().getTime();
    if (now - seenAt > idle || now - signedInAt > absolute) return req.session.regenerate(next);
    if (now - seenAt > touchEvery) await touchSession(deps, req.sessionID);
    next();
  };
}
