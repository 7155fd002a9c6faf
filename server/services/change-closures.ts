import { v7 as uuid } from 'uuid';
import type { Closure, ClosureFields } from '#contracts/hours.ts';
import { recordChange } from '../db/changes.ts';
import { deleteClosure, insertClosure, lockClosure, updateClosure } from '../db/hours.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { lockLamp } from '../db/lamps.ts';
import { lockPlace } from '../db/places.ts';
import { tryAgain } from '../db/try-again.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import { tellClashes } from '../planning/posted-clashes.ts';
import type { Actor } from '../policies.ts';
import { beforeAndAfter, differing } from './set-up-change.ts';

/**
 * Closes a place, a lamp or the whole shop, once or again and again. Posted work that lies in it is told, not moved.
 * @throws {Refusal} bad-request where the place or lamp is not of this shop
 */
export function createClosure(deps: Deps, actor: Actor, fields: ClosureFields) {
  const { shopId } = actor;
  return tryAgain(() =>
    inShop(deps.db, actor, async (trx) => {
      await mustBeThere(trx, shopId, fields);
      const id = uuid();
      const { clashes } = await tellClashes(trx, shopId, deps.now(), () => insertClosure(trx, shopId, id, fields));
      const closure = await lockedClosure(trx, shopId, id);
      await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: { closure: fields, added: true } });
      return { closure, clashes };
    }),
  );
}

/** @throws {Refusal} not-found; stale with the closure as it is now; bad-request for a foreign place or lamp */
export function changeClosure(deps: Deps, actor: Actor, id: string, input: ClosureFields & { version: number }) {
  const { version, ...given } = input;
  const { shopId } = actor;
  return tryAgain(() =>
    inShop(deps.db, actor, async (trx) => {
      const before = await lockedClosure(trx, shopId, id);
      const fields = differing<ClosureFields>(before, given);
      if (Object.keys(fields).length === 0) return { closure: before, clashes: [] };
      if (before.version !== version) throw new Refusal('stale', { current: before });
      await mustBeThere(trx, shopId, given);
      const { clashes } = await tellClashes(trx, shopId, deps.now(), () => updateClosure(trx, shopId, id, fields));
      await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: beforeAndAfter(before, fields) });
      return { closure: await lockedClosure(trx, shopId, id), clashes };
    }),
  );
}

/** @throws {Refusal} not-found; stale with the closure as it is now */
export function removeClosure(deps: Deps, actor: Actor, id: string, version: number): Promise<void> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const before = await lockedClosure(trx, shopId, id);
    if (before.version !== version) throw new Refusal('stale', { current: before });
    await deleteClosure(trx, shopId, id);
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: { closure: before, removed: true } });
  });
}

async function lockedClosure(trx: Trx, shopId: string, id: string): Promise<Closure> {
  const closure = await lockClosure(trx, shopId, id);
  if (!closure) throw notFound();
  return closure;
}

/** Holds what is closed, as whoever books it does. */
export async function mustBeThere(
  trx: Trx,
  shopId: string,
  { placeId, lampId }: Pick<ClosureFields, 'placeId' | 'lampId'>,
): Promise<void> {
  const fields = [
    ...(placeId !== null && !(await lockPlace(trx, shopId, placeId))
      ? [{ path: 'body.placeId', message: 'is no place of this shop' }]
      : []),
    ...(lampId !== null && !(await lockLamp(trx, shopId, lampId))
      ? [{ path: 'body.lampId', message: 'is no lamp of this shop' }]
      : []),
  ];
  if (fields.length > 0) throw new Refusal('bad-request', { fields });
}
