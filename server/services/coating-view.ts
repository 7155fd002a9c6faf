import type { CoatingDetail } from '#contracts/coatings.ts';
import { findCoating, type KeptCoating } from '../db/coatings.ts';
import type { Trx } from '../db/in-shop.ts';
import { notFound } from '../errors.ts';

export const coatingView = (kept: KeptCoating): CoatingDetail => ({
  ...kept,
  retiredAt: kept.retiredAt?.toISOString() ?? null,
});

/** @throws {Refusal} not-found */
export async function keptCoating(trx: Trx, shopId: string, id: string): Promise<KeptCoating> {
  const kept = await findCoating(trx, shopId, id);
  if (!kept) throw notFound();
  return kept;
}

/** The data sheet's page as it is now. @throws {Refusal} not-found */
export const coatingInShop = async (trx: Trx, shopId: string, id: string): Promise<CoatingDetail> =>
  coatingView(await keptCoating(trx, shopId, id));
