import * as contract from '#contracts/sign-up.ts';
import type { Deps } from '../deps.ts';
import { readMe } from '../services/read-me.ts';
import * as service from '../services/sign-up.ts';
import type { Limits } from './limits.ts';
import { mailboxIsHere } from './mailbox.ts';
import { startSession } from './passport.ts';
import type { Routes } from './route.ts';

/** How a stranger comes to an account and a shop: by a letter to an address that is theirs. */
export function signUpRoutes(routes: Routes, deps: Deps, limits: Limits): void {
  routes.open(contract.readSignUp, 'public', () => Promise.resolve({ open: service.isSignUpOpen(deps.config) }));
  routes.open(contract.askToSignUp, 'public', async ({ req, body }) => {
    await limits.letters.take(req, body.email);
    await service.askToSignUp(deps, body.email);
    return {};
  });
  routes.open(contract.readSignUpLink, 'public', async ({ req, body }) => {
    await limits.links.take(req);
    return service.readSignUpLink(deps, body.token);
  });
  routes.open(contract.signUp, 'public', async ({ req, body }) => {
    await limits.links.take(req);
    const account = await service.signUp(deps, body);
    await startSession(deps, req, account);
    return readMe(deps, account.id, mailboxIsHere(deps.config, req));
  });
}
