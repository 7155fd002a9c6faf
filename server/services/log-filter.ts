import type { Filter } from '#contracts/upkeep.ts';
import { recordChange } from '../db/changes.ts';
import { deleteEntry, insertEntry } from '../db/filters.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { lockedFilter } from './change-filters.ts';
import { filterInShop } from './list-filters.ts';

type Entry = { id: string; kind: 'change' | 'pressure'; at: string; pascals: number | null; note: string };

/** Clocks of phones run apart by minutes; an entry of tomorrow is a slip of the pen. */
const AHEAD = 15 * 60_000;

/**
 * Writes that a filter was changed or what its gauge said. Sent twice with the same id it is written once.
 * @throws {Refusal} not-found; bad-request where the time lies ahead
 */
export function addFilterEntry(deps: Deps, actor: Actor, filterId: string, entry: Entry): Promise<Filter> {
  const { shopId, accountId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    await lockedFilter(trx, shopId, filterId);
    const at = new Date(entry.at);
    if (at.getTime() > deps.now().getTime() + AHEAD)
      throw new Refusal('bad-request', { fields: [{ path: 'body.at', message: 'lies ahead' }] });
    const isNew = await insertEntry(trx, shopId, { ...entry, filterId, at, accountId });
    if (isNew)
      await recordChange(trx, actor, { kind: 'shop-changed', ids: [filterId], detail: { filterEntry: entry } });
    return filterInShop(trx, shopId, filterId, deps.now());
  });
}

/** Takes an entry back that was wrong. @throws {Refusal} not-found */
export function removeFilterEntry(deps: Deps, actor: Actor, filterId: string, entryId: string): Promise<Filter> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    await lockedFilter(trx, shopId, filterId);
    if ((await deleteEntry(trx, shopId, filterId, entryId)) === 0) throw notFound();
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [filterId], detail: { entryRemoved: entryId } });
    return filterInShop(trx, shopId, filterId, deps.now());
  });
}
