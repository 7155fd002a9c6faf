import { v7 as uuid } from 'uuid';
import type { Recurring } from '#contracts/recurrence.ts';
import { countHoursUp, deleteOpenings, insertOpenings, lockHours } from '../db/hours.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import { tellClashes } from '../planning/posted-clashes.ts';
import type { Actor } from '../policies.ts';
import { recordHours } from './set-week.ts';

/** Hours beside the usual week: one Saturday, every second one. They only add, so no posted work can clash. */
export function addOpening(deps: Deps, actor: Actor, opening: Recurring) {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    await lockHours(trx, shopId);
    const id = uuid();
    await insertOpenings(trx, shopId, [{ id, ...opening }]);
    const version = await countHoursUp(trx, shopId);
    await recordHours(trx, actor, { added: opening });
    return { id, version, clashes: [] };
  });
}

/** @throws {Refusal} not-found */
export function removeOpening(deps: Deps, actor: Actor, id: string) {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    await lockHours(trx, shopId);
    const { done, clashes } = await tellClashes(trx, shopId, deps.now(), () => deleteOpenings(trx, shopId, [id]));
    if (done === 0) throw notFound();
    const version = await countHoursUp(trx, shopId);
    await recordHours(trx, actor, { removed: id });
    return { version, clashes };
  });
}
