import { createApiKey, listApiKeys, revokeApiKey } from '#contracts/api-keys.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import * as create from '../services/create-api-key.ts';
import * as list from '../services/list-api-keys.ts';
import * as revoke from '../services/revoke-api-key.ts';
import type { Routes } from './route.ts';

export function apiKeyRoutes(routes: Routes, deps: Deps): void {
  routes.shop(listApiKeys, may.setUp, ({ actor }) => list.listApiKeys(deps, actor));
  routes.shop(createApiKey, may.setUp, ({ actor, body }) => create.createApiKey(deps, actor, body), {
    keepReply: false,
  });
  routes.shop(revokeApiKey, may.setUp, ({ actor, params }) => revoke.revokeApiKey(deps, actor, params.keyId));
}
