import type { Request } from 'express';
import { changeAccount, changePassword, readSession, signIn, signOut } from '#contracts/session.ts';
import type { Deps } from '../deps.ts';
import * as account from '../services/change-account.ts';
import * as password from '../services/change-password.ts';
import { readMe } from '../services/read-me.ts';
import * as leave from '../services/sign-out.ts';
import type { Limits } from './limits.ts';
import { mailboxIsHere } from './mailbox.ts';
import { checkCredentials, startSession, type OwnPassport } from './passport.ts';
import type { Routes } from './route.ts';
import { cookieKind, cookieName } from './session-store.ts';
import { mustBeSignedIn, signedInOf } from './signed-in.ts';

export function sessionRoutes(routes: Routes, deps: Deps, passport: OwnPassport, limits: Limits): void {
  routes.open(signIn, 'public', async ({ body, req, res }) => {
    await limits.password.take(req, body.email);
    const found = await checkCredentials(passport, req, res);
    await limits.password.forgive(req, body.email);
    await startSession(deps, req, found);
    req.log.info({ accountId: found.id }, 'signed in');
    return readMe(deps, found.id, mailboxIsHere(deps.config, req));
  });

  routes.open(readSession, 'account', ({ req }) =>
    readMe(deps, mustBeSignedIn(req).id, mailboxIsHere(deps.config, req)),
  );

  /** Signing out twice is signing out once. */
  routes.open(signOut, 'public', async ({ req, res }) => {
    const leaving = signedInOf(req);
    await endSession(req);
    if (leaving) await leave.signOut(deps, leaving.id);
    res.clearCookie(cookieName(deps.config), cookieKind(deps.config));
    // What the browser keeps is mine no longer; the cache holds nothing of the interface.
    res.set('Clear-Site-Data', '"storage"');
    return {};
  });

  routes.open(changeAccount, 'account', async ({ req, body }) => {
    const { id } = mustBeSignedIn(req);
    await account.changeAccount(deps, id, body);
    return readMe(deps, id, mailboxIsHere(deps.config, req));
  });

  routes.open(changePassword, 'account', async ({ req, body }) => {
    const asking = mustBeSignedIn(req);
    await limits.password.take(req, asking.email);
    await password.changePassword(deps, asking, body);
    await limits.password.forgive(req, asking.email);
    await startSession(deps, req, asking);
    return {};
  });
}

const endSession = (req: Request): Promise<void> =>
  new Promise((resolve, reject) => {
    req.session.destroy((error?: Error) => (error ? reject(error) : resolve()));
  });
