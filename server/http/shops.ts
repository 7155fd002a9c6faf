import { createShop as contract } from '#contracts/shops.ts';
import type { Deps } from '../deps.ts';
import { createShop } from '../services/create-shop.ts';
import { readMe } from '../services/read-me.ts';
import type { Limits } from './limits.ts';
import { mailboxIsHere } from './mailbox.ts';
import type { Routes } from './route.ts';
import { mustBeSignedIn } from './signed-in.ts';

export function openShopRoutes(routes: Routes, deps: Deps, limits: Limits): void {
  routes.open(contract, 'account', async ({ req, body }) => {
    const { id } = mustBeSignedIn(req);
    await limits.shops.take(id);
    await createShop(deps, id, body);
    return readMe(deps, id, mailboxIsHere(deps.config, req));
  });
}
