import { v7 as uuid } from 'uuid';
import type { Filter, FilterFields } from '#contracts/upkeep.ts';
import { recordChange } from '../db/changes.ts';
import { insertFilter, loadFilters, lockFilter, updateFilter, type FilterRow } from '../db/filters.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { lockPlace } from '../db/places.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { filterInShop } from './list-filters.ts';
import { beforeAndAfter, differing, isNameTaken, nameTaken, type Given } from './set-up-change.ts';

/** @throws {Refusal} bad-request where the place is not of this shop or has a filter of that name */
export function createFilter(deps: Deps, actor: Actor, fields: FilterFields): Promise<Filter> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const place = await lockPlace(trx, shopId, fields.placeId);
    if (!place)
      throw new Refusal('bad-request', { fields: [{ path: 'body.placeId', message: 'is no place of this shop' }] });
    await mustBeFree(trx, shopId, fields, null);
    const id = uuid();
    await insertFilter(trx, shopId, id, fields);
    const detail = { filter: `${place.name}, ${fields.name}`, added: true };
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail });
    return filterInShop(trx, shopId, id, deps.now());
  });
}

type Change = Given<Omit<FilterFields, 'placeId'>> & { version: number; retired?: boolean | undefined };

/** @throws {Refusal} not-found; stale with the filter as it is now; bad-request where the name is used in that place */
export function changeFilter(deps: Deps, actor: Actor, id: string, input: Change): Promise<Filter> {
  const { version, ...given } = input;
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const before = await lockedFilter(trx, shopId, id);
    const { retired, ...fields } = differing(before, given);
    if (Object.keys(fields).length === 0 && retired === undefined) return filterInShop(trx, shopId, id, deps.now());
    if (before.version !== version)
      throw new Refusal('stale', { current: await filterInShop(trx, shopId, id, deps.now()) });
    if (fields.name !== undefined) await mustBeFree(trx, shopId, { ...before, name: fields.name }, id);
    await updateFilter(trx, shopId, id, {
      ...fields,
      ...(retired === undefined ? {} : { retiredAt: retired ? deps.now() : null }),
    });
    const detail = beforeAndAfter(before, { ...fields, ...(retired === undefined ? {} : { retired }) });
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail });
    return filterInShop(trx, shopId, id, deps.now());
  });
}

/** @throws {Refusal} not-found */
export async function lockedFilter(trx: Trx, shopId: string, id: string): Promise<FilterRow> {
  const row = await lockFilter(trx, shopId, id);
  if (!row) throw notFound();
  return row;
}

async function mustBeFree(
  trx: Trx,
  shopId: string,
  { placeId, name }: Pick<FilterFields, 'placeId' | 'name'>,
  exceptId: string | null,
): Promise<void> {
  const there = (await loadFilters(trx, shopId)).filter((filter) => filter.placeId === placeId);
  if (isNameTaken(there, name, exceptId)) throw nameTaken();
}
