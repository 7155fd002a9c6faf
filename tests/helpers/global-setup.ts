import type { TestProject } from 'vitest/node';
import { migrateLatest } from '#server/db/migrate.ts';
import type { Cluster } from '../../scripts/lib/postgres.mjs';
import { throwawayCluster } from './postgres.ts';

declare module 'vitest' {
  interface ProvidedContext {
    /** Superuser's address of the template database, which has the newest schema and no rows. */
    templateUrl: string;
  }
}

type Shared = { users: number; cluster: Promise<Cluster> };
// Each project loads this file anew, but all in one process: they share one server through the global object.
const shelf = globalThis as { ovenbirdTestCluster?: Shared | undefined };

async function migratedCluster(): Promise<Cluster> {
  const cluster = await throwawayCluster();
  try {
    await migrateLatest(cluster.url('template_ovenbird'));
  } catch (error) {
    await cluster.stop();
    throw error;
  }
  return cluster;
}

export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const shared = (shelf.ovenbirdTestCluster ??= { users: 0, cluster: migratedCluster() });
  shared.users += 1;
  const cluster = await shared.cluster;
  project.provide('templateUrl', cluster.url('template_ovenbird'));
  return async () => {
    shared.users -= 1;
    if (shared.users > 0) return;
    shelf.ovenbirdTestCluster = undefined;
    await cluster.stop();
  };
}
