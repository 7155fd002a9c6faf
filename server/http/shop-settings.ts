import * as contract from '#contracts/shop-settings.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import { changeShop } from '../services/change-shop.ts';
import { readShop } from '../services/read-shop.ts';
import { sendTestLetter } from '../services/send-test-letter.ts';
import type { Routes } from './route.ts';

export function shopRoutes(routes: Routes, deps: Deps): void {
  routes.shop(contract.readShop, may.plan, ({ actor }) => readShop(deps, actor));
  routes.shop(contract.changeShop, may.setUp, ({ actor, body }) => changeShop(deps, actor, body));
  routes.shop(contract.sendTestLetter, may.setUp, ({ actor }) => sendTestLetter(deps, actor));
}
