import type { Readable } from 'node:stream';

export type StoredObject = { bytes: number; changedAt: Date };

/** Where the bytes of files lie. Keys are ours, `shop/SHOP/ID`, never a person's words. */
export type Storage = {
  /** Whole or not at all: a key that can be read holds all of its bytes. Anew over what is there. */
  put(key: string, body: Readable, file: { bytes: number; mime: string }): Promise<void>;
  /** The bytes from the beginning; null where there is nothing. */
  get(key: string): Promise<Readable | null>;
  head(key: string): Promise<StoredObject | null>;
  /** Also where there is nothing. */
  delete(key: string): Promise<void>;
  /** Every key with when it was written, in no order. */
  list(): AsyncIterable<{ key: string; changedAt: Date }>;
};

const uuid = '[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}';
const ours = new RegExp(`^shop/(${uuid})/(${uuid})$`);

export const keyOf = (shopId: string, id: string): string => `shop/${shopId}/${id}`;

/** Null for a key that is not of this shape: then it is none of ours. */
export function partsOfKey(key: string): { shopId: string; id: string } | null {
  const [, shopId, id] = ours.exec(key) ?? [];
  return shopId !== undefined && id !== undefined ? { shopId, id } : null;
}

/** @throws RangeError for a key that could lead out of the store: a fault of ours */
export function checkedKey(key: string): string {
  if (!partsOfKey(key)) throw new RangeError('not a key of the store');
  return key;
}
