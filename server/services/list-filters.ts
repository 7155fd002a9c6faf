import type { Filter } from '#contracts/upkeep.ts';
import { lastChanges, loadEntries, loadFilters, sprayMinutes } from '../db/filters.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { findShopFrame } from '../db/people.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import { filterStanding, PACE_DAYS } from '../planning/filter-standing.ts';
import type { Actor } from '../policies.ts';

const DAY = 86_400_000;
/** Of each filter; older ones stay on record. */
const mostEntries = 50;

export const listFilters = (deps: Deps, actor: Actor): Promise<{ filters: Filter[] }> =>
  inShop(deps.db, actor, async (trx) => ({ filters: await filtersInShop(trx, actor.shopId, deps.now()) }));

/** @throws {Refusal} not-found */
export async function filterInShop(trx: Trx, shopId: string, id: string, now: Date): Promise<Filter> {
  const filter = (await filtersInShop(trx, shopId, now)).find((one) => one.id === id);
  if (!filter) throw notFound();
  return filter;
}

/** Five statements, however many filters there are. */
async function filtersInShop(trx: Trx, shopId: string, now: Date): Promise<Filter[]> {
  const { timeZone } = await findShopFrame(trx, shopId);
  const filters = await loadFilters(trx, shopId);
  const entries = await loadEntries(trx, shopId, mostEntries);
  const changes = await lastChanges(trx, shopId);
  const sprayed = await sprayMinutes(trx, shopId, new Date(now.getTime() - PACE_DAYS * DAY));
  return filters.map((filter) => {
    const own = entries.filter(({ filterId }) => filterId === filter.id);
    const changedAt = changes.get(filter.id) ?? null;
    const reading = own.find(({ pascals, at }) => pascals !== null && (changedAt === null || at >= changedAt));
    const facts = {
      changedAt,
      minutesSinceChange: sprayed.get(filter.id)?.sinceChange ?? 0,
      minutesInPace: sprayed.get(filter.id)?.sincePace ?? 0,
      reading: reading && reading.pascals !== null ? { pascals: reading.pascals, at: reading.at } : null,
    };
    return {
      ...filter,
      standing: filterStanding(filter, facts, now, timeZone),
      entries: own.map(({ filterId: _filterId, at, ...entry }) => ({ ...entry, at: at.toISOString() })),
    };
  });
}
