import type { Circuit, Lamp } from '#contracts/lamps.ts';
import { loadCircuits } from '../db/circuits.ts';
import { inShop } from '../db/in-shop.ts';
import { loadLamps } from '../db/lamps.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';

export function listLamps(deps: Deps, actor: Actor): Promise<{ lamps: Lamp[]; circuits: Circuit[] }> {
  return inShop(deps.db, actor, async (trx) => ({
    lamps: await loadLamps(trx, actor.shopId),
    circuits: await loadCircuits(trx, actor.shopId),
  }));
}
