import type { CoatingDetail } from '#contracts/coatings.ts';
import * as coatings from '../db/coatings.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';
import { coatingInShop, coatingView } from './coating-view.ts';

export async function surveyCoatings(
  deps: Deps,
  actor: Actor,
  { retired }: { retired: 'no' | 'yes' },
): Promise<{ coatings: CoatingDetail[] }> {
  const kept = await inShop(deps.db, actor, (trx) => coatings.surveyCoatings(trx, actor.shopId, retired === 'yes'));
  return { coatings: kept.map(coatingView) };
}

/** @throws {Refusal} not-found */
export const readCoating = (deps: Deps, actor: Actor, id: string): Promise<CoatingDetail> =>
  inShop(deps.db, actor, (trx) => coatingInShop(trx, actor.shopId, id));
