import type { Request } from 'express';
import { listLetters, listMailbox, readMailboxLetter } from '#contracts/mailbox.ts';
import type { Config } from '../config.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import { may } from '../policies.ts';
import * as outbox from '../services/list-letters.ts';
import * as mailbox from '../services/mailbox.ts';
import { addressOf } from './limits.ts';
import type { Routes } from './route.ts';

const isLoopback = (address: string): boolean => address.startsWith('127.') || address === '0:0:0:0::/64';

/**
 * Letters hold links that open accounts, and the local mailbox is read without signing in: only where the local mail
 * server runs, and only by who sits at that machine.
 */
export const mailboxIsHere = (config: Config, req: Request): boolean =>
  config.DEV_MAILBOX_DIR !== undefined && isLoopback(addressOf(req));

function folderFor(config: Config, req: Request): string {
  if (config.DEV_MAILBOX_DIR === undefined || !mailboxIsHere(config, req)) throw notFound();
  return config.DEV_MAILBOX_DIR;
}

export function mailboxRoutes(routes: Routes, deps: Deps): void {
  routes.open(listMailbox, 'public', async ({ req }) => ({
    letters: await mailbox.listMailbox(folderFor(deps.config, req)),
  }));
  routes.open(readMailboxLetter, 'public', ({ req, params }) =>
    mailbox.readMailboxLetter(folderFor(deps.config, req), params.letterId),
  );
  routes.shop(listLetters, may.setUp, ({ actor, query }) => outbox.listLetters(deps, actor, query.state));
}
