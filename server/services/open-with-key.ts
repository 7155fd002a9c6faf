import { parse, stringify } from 'uuid';
import { randomBytes } from 'node:crypto';
import { useApiKey } from '../db/api-keys.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { hashOf } from './one-time-token.ts';

export type KeyHolder = { shopId: string; keyId: string };

const PREFIX = 'ovk_';
const SECRET_BYTES = 32;
const form = /^ovk_[A-Za-z0-9_-]{64}$/;

/**
 * A new key: which shop it is of (16 bytes), then 256 bits that nobody can guess. That it names its shop lets the row be
 * found inside the shop's own fence; a key with another shop's name in it finds nothing there.
 */
export const makeKey = (shopId: string): string =>
  PREFIX + Buffer.concat([parse(shopId), randomBytes(SECRET_BYTES)]).toString('base64url');

/** Who sends with this key; null where it was never given out or is revoked. Why is nobody's business. */
export async function openWithKey(deps: Deps, secret: string): Promise<KeyHolder | null> {
  const shopId = form.test(secret) ? shopOf(secret) : null;
  if (shopId === null) return null;
  const keyId = await inShop(deps.db, { shopId, accountId: null }, (trx) =>
    useApiKey(trx, shopId, hashOf(secret), deps.now()),
  );
  return keyId === undefined ? null : { shopId, keyId };
}

function shopOf(secret: string): string | null {
  try {
    return stringify(Buffer.from(secret.slice(PREFIX.length), 'base64url').subarray(0, 16));
  } catch {
    // Sixteen bytes that are no uuid are the name of no shop.
    return null;
  }
}
