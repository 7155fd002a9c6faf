import { isDeepStrictEqual } from 'node:util';
import type * as z from 'zod';
import type { coatingChange, CoatingDetail } from '#contracts/coatings.ts';
import { recordChange } from '../db/changes.ts';
import { lockCoating, updateCoating, type CoatingFields, type KeptCoating } from '../db/coatings.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { lockShop } from '../db/locks.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { checkCoating } from './check-coating.ts';
import { coatingInShop, keptCoating } from './coating-view.ts';

type Given = z.output<typeof coatingChange>;

/**
 * Changes the fields that are given, takes out of use or brings back. What says the same as before changes nothing, so a
 * repeated request is harmless. Times of process sheets and jobs stay until `retime-with-coating`.
 * @throws {Refusal} not-found; stale with the data sheet as it is now; bad-request with fields
 */
export function changeCoating(deps: Deps, actor: Actor, id: string, given: Given): Promise<CoatingDetail> {
  return inShop(deps.db, actor, async (trx) => {
    const { shopId } = actor;
    await lockShop(trx, shopId);
    await lockCoating(trx, shopId, id);
    const before = await keptCoating(trx, shopId, id);
    const fields = differing(before, given, deps.now());
    if (Object.keys(fields).length > 0) {
      if (before.version !== given.version)
        throw new Refusal('stale', { current: await coatingInShop(trx, shopId, id) });
      await putCoating(trx, actor, before, fields);
    }
    return coatingInShop(trx, shopId, id);
  });
}

/** Also what an import does for each line. The shop's and the coating's rows are held by the caller. */
export async function putCoating(
  trx: Trx,
  actor: Actor,
  before: KeptCoating,
  fields: Partial<CoatingFields>,
): Promise<void> {
  await checkCoating(trx, actor.shopId, { ...before, ...fields });
  await updateCoating(trx, actor.shopId, before.id, fields);
  const was = Object.fromEntries(Object.keys(fields).map((field) => [field, before[field as keyof CoatingFields]]));
  const detail = { coating: 'changed', before: was, after: fields };
  await recordChange(trx, actor, { kind: 'sheets-changed', ids: [before.id], detail });
}

/** Only what is given and not as it was. */
export function differing(before: KeptCoating, given: Omit<Given, 'version'>, now: Date): Partial<CoatingFields> {
  const { name, kind, sheet, retired } = given;
  const retires = retired !== undefined && retired !== (before.retiredAt !== null);
  return {
    ...(name === undefined || name === before.name ? {} : { name }),
    ...(kind === undefined || kind === before.kind ? {} : { kind }),
    ...(sheet === undefined || isDeepStrictEqual(sheet, before.sheet) ? {} : { sheet }),
    ...(retires ? { retiredAt: retired ? now : null } : {}),
  };
}
