import { createReadStream, createWriteStream } from 'node:fs';
import { mkdir, opendir, rename, rm, stat } from 'node:fs/promises';
import path from 'node:path';
import type { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { v7 as uuid } from 'uuid';
import { checkedKey, partsOfKey, type Storage } from './storage.ts';

const isMissing = (error: unknown): boolean => (error as NodeJS.ErrnoException).code === 'ENOENT';

/** Files below a folder of this machine, which only the program may read. Written beside their name and then renamed. */
export function diskStorage(folder: string): Storage {
  const fileOf = (key: string) => path.join(folder, checkedKey(key));
  return {
    async put(key, body) {
      const file = fileOf(key);
      const unfinished = `${file}.${uuid()}.part`;
      await mkdir(path.dirname(file), { recursive: true, mode: 0o700 });
      try {
        // Flushed, or a power cut could leave a name without its bytes.
        await pipeline(body, createWriteStream(unfinished, { flags: 'wx', mode: 0o600, flush: true }));
        await rename(unfinished, file);
      } catch (error) {
        await rm(unfinished, { force: true });
        throw error;
      }
    },
    async get(key) {
      const stream = createReadStream(fileOf(key));
      return new Promise<Readable | null>((resolve, reject) => {
        stream.once('open', () => resolve(stream));
        stream.once('error', (error) => (isMissing(error) ? resolve(null) : reject(error)));
      });
    },
    async head(key) {
      try {
        const { size, mtime } = await stat(fileOf(key));
        return { bytes: size, changedAt: mtime };
      } catch (error) {
        if (isMissing(error)) return null;
        throw error;
      }
    },
    delete: (key) => rm(fileOf(key), { force: true }),
    list: () => everyFile(folder),
  };
}

async function* everyFile(folder: string): AsyncGenerator<{ key: string; changedAt: Date }> {
  for await (const shop of entriesOf(path.join(folder, 'shop')))
    for await (const name of entriesOf(path.join(folder, 'shop', shop))) {
      const file = path.join(folder, 'shop', shop, name);
      const changedAt = await stat(file).then(
        ({ mtime }) => mtime,
        () => null,
      );
      // What broke off in the middle goes like a file that nobody knows, under its own name.
      const key = `shop/${shop}/${name}`;
      if (changedAt && partsOfKey(key)) yield { key, changedAt };
      else if (changedAt && name.endsWith('.part') && Date.now() - changedAt.getTime() > 86_400_000)
        await rm(file, { force: true });
    }
}

async function* entriesOf(folder: string): AsyncGenerator<string> {
  try {
    for await (const entry of await opendir(folder)) yield entry.name;
  } catch (error) {
    if (!isMissing(error) && (error as NodeJS.ErrnoException).code !== 'ENOTDIR') throw error;
  }
}
