import { readSession, signIn } from '#contracts/session.ts';
import type { Deps } from '../deps.ts';
import { readMe } from '../services/read-me.ts';
import { checkCredentials, startSession, type OwnPassport } from './passport.ts';
import type { Routes } from './route.ts';
import { mustBeSignedIn } from './signed-in.ts';

export function sessionRoutes(routes: Routes, deps: Deps, passport: OwnPassport): void {
  routes.open(signIn, 'public', async ({ req, res }) => {
    const account = await checkCredentials(passport, req, res);
    await startSession(deps, req, account);
    return readMe(deps, account.id);
  });
  routes.open(readSession, 'account', ({ req }) => readMe(deps, mustBeSignedIn(req).id));
}
