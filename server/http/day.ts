import { readDay } from '#contracts/day.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import * as read from '../services/read-day.ts';
import type { Routes } from './route.ts';

export function dayRoutes(routes: Routes, deps: Deps): void {
  routes.shop(readDay, may.seeShop, ({ actor, query }) => read.readDay(deps, actor, query));
}
