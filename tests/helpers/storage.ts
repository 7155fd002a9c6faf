import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { diskStorage } from '#server/storage/disk.ts';
import type { Storage } from '#server/storage/storage.ts';

/** A store in a folder of its own, gone when the test's process ends. */
export function tempStorage(): Storage {
  const folder = mkdtempSync(path.join(tmpdir(), 'ovenbird-test-files-'));
  process.once('exit', () => rmSync(folder, { recursive: true, force: true }));
  return diskStorage(folder);
}
