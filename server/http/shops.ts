import { createShop as contract, resetDemo as resetContract } from '#contracts/shops.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import { createShop } from '../services/create-shop.ts';
import { readMe } from '../services/read-me.ts';
import { resetDemo } from '../services/reset-demo.ts';
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
  routes.shop(resetContract, may.setUp, async ({ actor, body }) => {
    await resetDemo(deps, actor, body.words);
    return {};
  });
}
