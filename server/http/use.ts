import { readUse } from '#contracts/use.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import * as read from '../services/read-use.ts';
import type { Routes } from './route.ts';

export function useRoutes(routes: Routes, deps: Deps): void {
  routes.shop(readUse, may.seeUse, ({ actor, query }) => read.readUse(deps, actor, query));
}
