import { acceptInvitation, askForReset, readInvitation, resetPassword } from '#contracts/session.ts';
import type { Deps } from '../deps.ts';
import * as accept from '../services/accept-invitation.ts';
import * as ask from '../services/ask-for-reset.ts';
import * as read from '../services/read-invitation.ts';
import { readMe } from '../services/read-me.ts';
import * as reset from '../services/reset-password.ts';
import type { Limits } from './limits.ts';
import { mailboxIsHere } from './mailbox.ts';
import { startSession } from './passport.ts';
import type { Routes } from './route.ts';

/** What works by a link from a letter, and asking for one. */
export function linkRoutes(routes: Routes, deps: Deps, limits: Limits): void {
  routes.open(askForReset, 'public', async ({ req, body }) => {
    await limits.letters.take(req, body.email);
    await ask.askForReset(deps, body.email);
    return {};
  });
  routes.open(resetPassword, 'public', async ({ req, body }) => {
    await limits.links.take(req);
    await reset.resetPassword(deps, body);
    return {};
  });
  routes.open(readInvitation, 'public', async ({ req, body }) => {
    await limits.links.take(req);
    return read.readInvitation(deps, body.token);
  });
  routes.open(acceptInvitation, 'public', async ({ req, body }) => {
    await limits.links.take(req);
    await limits.password.take(req, body.token);
    const account = await accept.acceptInvitation(deps, body);
    await startSession(deps, req, account);
    return readMe(deps, account.id, mailboxIsHere(deps.config, req));
  });
}
