import { randomBytes } from 'node:crypto';
import pg from 'pg';
import { inject } from 'vitest';

export type TestDatabase = {
  /** As the owner of the tables: for migrations and for looking behind the fence of row level security. */
  ownerUrl: string;
  /** What the server is started with. It drops to the role `ovenbird_app` on each connection. */
  url: string;
  drop(): Promise<void>;
};

/** A database of its own with the newest schema and no rows: a clone of the template, made in a moment. */
export async function freshDatabase(): Promise<TestDatabase> {
  const templateUrl = inject('templateUrl');
  const template = new URL(templateUrl).pathname.slice(1);
  const name = `test_${randomBytes(6).toString('hex')}`;
  const ownerUrl = withDatabase(templateUrl, name);
  await asOwner(templateUrl, `CREATE DATABASE ${name} TEMPLATE ${template}`);
  return { ownerUrl, url: ownerUrl, drop: () => asOwner(templateUrl, `DROP DATABASE IF EXISTS ${name} WITH (FORCE)`) };
}

/** A clone needs its template free of sessions, so orders of this kind are given from the `postgres` database. */
async function asOwner(anyUrl: string, order: string): Promise<void> {
  const client = new pg.Client({ connectionString: withDatabase(anyUrl, 'postgres') });
  await client.connect();
  try {
    await client.query(order);
  } finally {
    await client.end();
  }
}

function withDatabase(url: string, name: string): string {
  const changed = new URL(url);
  changed.pathname = `/${name}`;
  return changed.href;
}
