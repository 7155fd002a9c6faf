import type { ShopFields } from '#contracts/shop-settings.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { lockShopRow, updateShop } from '../db/shop.ts';
import { tryAgain } from '../db/try-again.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import { tellClashes } from '../planning/posted-clashes.ts';
import type { Actor } from '../policies.ts';
import { shopView } from './read-shop.ts';
import { beforeAndAfter, differing, type Given } from './set-up-change.ts';

/**
 * Changes the shop's settings that are given. Another time zone reads all wall times in it: bookings stay the instants they
 * are, and those that then lie outside of hours and shifts are told.
 * @throws {Refusal} stale with the settings as they are now; bad-request for a zone that does not exist
 */
export function changeShop(deps: Deps, actor: Actor, input: Given<ShopFields> & { version: number }) {
  const { version, ...given } = input;
  const { shopId } = actor;
  return tryAgain(() =>
    inShop(deps.db, actor, async (trx) => {
      const before = await lockShopRow(trx, shopId);
      const fields = differing<ShopFields>(before, given);
      if (Object.keys(fields).length === 0) return { shop: await shopView(trx, deps.config, actor), clashes: [] };
      if (before.version !== version) throw new Refusal('stale', { current: await shopView(trx, deps.config, actor) });
      if (fields.timeZone !== undefined && !isZone(fields.timeZone))
        throw new Refusal('bad-request', { fields: [{ path: 'body.timeZone', message: 'is no time zone' }] });
      const { clashes } = await tellClashes(trx, shopId, deps.now(), () => updateShop(trx, shopId, fields));
      await recordChange(trx, actor, { kind: 'shop-changed', ids: [shopId], detail: beforeAndAfter(before, fields) });
      return { shop: await shopView(trx, deps.config, actor), clashes };
    }),
  );
}

/** A name of the IANA list that this machine knows; bare offsets have no summer time and are none. */
export function isZone(name: string): boolean {
  if (!/^[A-Za-z]/.test(name)) return false;
  try {
    return new Intl.DateTimeFormat('en', { timeZone: name }).resolvedOptions().timeZone !== '';
  } catch {
    return false;
  }
}
