import { randomBytes, randomUUID } from 'node:crypto';
import { existsSync, mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { Readable } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import { afterAll, beforeEach, describe, expect, test } from 'vitest';
import { diskStorage } from '#server/storage/disk.ts';
import { s3Storage } from '#server/storage/s3.ts';
import { keyOf, partsOfKey, type Storage } from '#server/storage/storage.ts';
import { fakeS3 } from './fake-s3.ts';

const folder = mkdtempSync(path.join(tmpdir(), 'ovenbird-storage-test-'));
const s3 = await fakeS3();
afterAll(async () => {
  rmSync(folder, { recursive: true });
  await s3.close();
});

async function all<T>(list: AsyncIterable<T>): Promise<T[]> {
  const found: T[] = [];
  for await (const one of list) found.push(one);
  return found;
}

const credentials = { accessKeyId: 'test', secretAccessKey: 'test' };
const stores: [string, () => Storage][] = [
  ['a folder', () => diskStorage(folder)],
  ['S3', () => s3Storage({ bucket: s3.bucket, region: 'us-east-1', endpoint: s3.endpoint, credentials })],
];

// One contract, held by each.
describe.each(stores)('%s', (_, open) => {
  const store = open();
  let key: string;
  beforeEach(() => {
    key = keyOf(randomUUID(), randomUUID());
  });
  const put = (bytes: Buffer) =>
    store.put(key, Readable.from([bytes]), { bytes: bytes.length, mime: 'application/pdf' });
  const got = async () => {
    const stream = await store.get(key);
    return stream && (await buffer(stream));
  };

  test('gives back every byte, and what there is of it', async () => {
    const bytes = randomBytes(3_000_000);
    const before = Date.now();
    await put(bytes);
    expect((await got())?.equals(bytes)).toBe(true);
    const head = await store.head(key);
    expect(head?.bytes).toBe(bytes.length);
    // HTTP dates have whole seconds.
    expect(head?.changedAt.getTime()).toBeGreaterThanOrEqual(Math.floor(before / 1000) * 1000 - 1000);
  });
  test('writes anew over what is there', async () => {
    await put(Buffer.from('first'));
    await put(Buffer.from('and second'));
    expect(String(await got())).toBe('and second');
  });
  test('has nothing under a key that was never written or was deleted; deleting twice is no fault', async () => {
    expect([await store.get(key), await store.head(key)]).toEqual([null, null]);
    await put(Buffer.from('x'));
    await store.delete(key);
    await store.delete(key);
    expect([await store.get(key), await store.head(key)]).toEqual([null, null]);
  });
  test('keeps nothing of a body that breaks off', async () => {
    const torn = Readable.from(
      (function* () {
        yield Buffer.from('the beginning');
        throw new Error('torn');
      })(),
    );
    await expect(store.put(key, torn, { bytes: 1000, mime: 'application/pdf' })).rejects.toThrow();
    expect(await store.head(key)).toBeNull();
  });
  test('lists every key with its age', async () => {
    const keys = Array.from({ length: 5 }, () => keyOf(randomUUID(), randomUUID()));
    for (key of keys) await put(Buffer.from('x'));
    const found = await all(store.list());
    expect(found.map((one) => one.key)).toEqual(expect.arrayContaining(keys));
    for (const { changedAt } of found) expect(Math.abs(Date.now() - changedAt.getTime())).toBeLessThan(600_000);
  });
  test.each(['../outside', `shop/${randomUUID()}/../../x`, '/etc/passwd', '', 'shop/a/b'])(
    'never touches %s',
    async (stray) => {
      await expect((async () => store.get(stray))()).rejects.toThrow(RangeError);
      await expect(
        (async () => store.put(stray, Readable.from(['x']), { bytes: 1, mime: 'text/plain' }))(),
      ).rejects.toThrow(RangeError);
    },
  );
});

test('a folder leaves no unfinished file behind, and an empty one lists nothing', async () => {
  const shop = randomUUID();
  const torn = Readable.from(
    (function* () {
      yield 'x';
      throw new Error('torn');
    })(),
  );
  const store = diskStorage(folder);
  await expect(store.put(keyOf(shop, randomUUID()), torn, { bytes: 9, mime: 'text/plain' })).rejects.toThrow('torn');
  expect(readdirSync(path.join(folder, 'shop', shop))).toEqual([]);
  const none = path.join(folder, 'none');
  expect(await all(diskStorage(none).list())).toEqual([]);
  expect(existsSync(none)).toBe(false);
});

test('a key says whose it is', () => {
  const [shopId, id] = [randomUUID(), randomUUID()];
  expect(partsOfKey(keyOf(shopId, id))).toEqual({ shopId, id });
  expect(partsOfKey(`shop/${shopId}/${id}.part`)).toBeNull();
});
