import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { isAlive } from '../../scripts/lib/children.mjs';
import { openCluster, type Cluster } from '../../scripts/lib/postgres.mjs';

const prefix = 'ovenbird-test-';

/** A PostgreSQL server for tests only: apart from the data of `npm start`, quick, and gone when stopped. */
export async function throwawayCluster(): Promise<Cluster> {
  removeLeftovers();
  const folder = mkdtempSync(path.join(tmpdir(), prefix));
  try {
    const cluster = await openCluster({ folder, durable: false, database: 'template_ovenbird' });
    return { ...cluster, stop: () => cluster.stop().then(() => remove(cluster.folder)) };
  } catch (error) {
    remove(folder);
    throw error;
  }
}

function remove(folder: string): void {
  rmSync(folder, { recursive: true, force: true });
}

/** Folders of test runs that were killed before they could clear up. */
function removeLeftovers(): void {
  for (const name of readdirSync(tmpdir()).filter((entry) => entry.startsWith(prefix))) {
    const folder = path.join(tmpdir(), name);
    try {
      if (!isAlive(parseInt(readFileSync(path.join(folder, 'keeper'), 'utf8')))) remove(folder);
    } catch {
      // Just being made, or another user's: not ours to clear.
    }
  }
}
