import * as contract from '#contracts/upkeep.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import { changeFilter, createFilter } from '../services/change-filters.ts';
import { listFilters } from '../services/list-filters.ts';
import { addFilterEntry, removeFilterEntry } from '../services/log-filter.ts';
import type { Routes } from './route.ts';

/** Filters and their log. Who works in the bay writes into it; owners say when a filter is due. */
export function upkeepRoutes(routes: Routes, deps: Deps): void {
  routes.shop(contract.listFilters, may.seeShop, ({ actor }) => listFilters(deps, actor));
  routes.shop(contract.createFilter, may.setUp, ({ actor, body }) => createFilter(deps, actor, body));
  routes.shop(contract.changeFilter, may.setUp, ({ actor, params, body }) =>
    changeFilter(deps, actor, params.filterId, body),
  );
  routes.shop(contract.addFilterEntry, may.workStages, ({ actor, params, body }) =>
    addFilterEntry(deps, actor, params.filterId, body),
  );
  routes.shop(contract.removeFilterEntry, may.plan, ({ actor, params }) =>
    removeFilterEntry(deps, actor, params.filterId, params.entryId),
  );
}
