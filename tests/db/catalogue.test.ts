import type { Knex } from 'knex';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { inShop } from '#server/db/in-shop.ts';
import { testApp, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop } from '../helpers/factories.ts';
import { aBooking, aJob, aShop } from '../helpers/factories-jobs.ts';

/** Not of one shop: people who sign in, and the queue, which holds ids only. Any other table must be a shop's. */
const notOfAShop = [
  'account',
  'account_token',
  'session',
  'rate_limit',
  'task',
  'knex_migrations',
  'knex_migrations_lock',
];

let database: TestDatabase;
let app: TestApp;
let owner: Knex;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
  owner = app.owner;
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

async function rows<T>(sql: string, bindings: readonly (string | string[])[] = []): Promise<T[]> {
  const answer = await owner.raw<{ rows: T[] }>(sql, [...bindings]);
  return answer.rows;
}

/** Tables as the program sees them; partitions answer for themselves below. */
const tables = async (): Promise<string[]> => {
  const all = await rows<{ name: string }>(
    `select relname as name from pg_class c join pg_namespace n on n.oid = c.relnamespace
     where n.nspname = 'public' and c.relkind in ('r', 'p') and not c.relispartition order by 1`,
  );
  return all.map((table) => table.name).filter((name) => !notOfAShop.includes(name));
};
const tenantTables = async () => (await tables()).filter((name) => name !== 'shop');

describe('the schema keeps shops apart', () => {
  test('there are tables to look at', async () => {
    expect((await tenantTables()).length).toBeGreaterThan(20);
  });

  test('shop_id stands first in the primary key of each table', async () => {
    const first = await rows<{ name: string; column: string }>(
      `select c.relname as name, a.attname as column from pg_constraint k
       join pg_class c on c.oid = k.conrelid
       join pg_attribute a on a.attrelid = c.oid and a.attnum = k.conkey[1]
       where k.contype = 'p' and c.relname = any(?) order by 1`,
      [await tenantTables()],
    );
    expect(first).toEqual((await tenantTables()).map((name) => ({ name, column: 'shop_id' })));
  });

  test('each foreign key between shops’ tables, each unique and each exclusion contains shop_id', async () => {
    const loose = await rows(
      `select k.conname, k.conrelid::regclass::text as table from pg_constraint k
       join pg_class c on c.oid = k.conrelid
       left join pg_class f on f.oid = k.confrelid
       where c.relname = any(?) and not c.relispartition
         and (k.contype in ('p', 'u', 'x') or (k.contype = 'f' and f.relname = any(?)))
         and not exists (select 1 from pg_attribute a where a.attrelid = c.oid and a.attname = 'shop_id' and a.attnum = any(k.conkey))`,
      [await tenantTables(), await tenantTables()],
    );
    expect(loose).toEqual([]);
    const indexes = await rows(
      `select i.indexrelid::regclass::text as index from pg_index i join pg_class c on c.oid = i.indrelid
       where i.indisunique and c.relname = any(?) and not exists (
         select 1 from pg_attribute a where a.attrelid = c.oid and a.attname = 'shop_id' and a.attnum = any(i.indkey))`,
      [await tenantTables()],
    );
    expect(indexes).toEqual([]);
  });

  test('row level security is enabled and forced, on partitions too, and a policy names the shop', async () => {
    const open = await rows(
      `select c.relname from pg_class c join pg_namespace n on n.oid = c.relnamespace
       where n.nspname = 'public' and c.relkind in ('r', 'p') and not c.relname = any(?)
         and not (c.relrowsecurity and c.relforcerowsecurity)`,
      [notOfAShop],
    );
    expect(open).toEqual([]);
    const fenced = await rows<{ name: string }>(
      `select distinct tablename as name from pg_policies where (qual like '%current_shop()%') and (with_check like '%current_shop()%') order by 1`,
    );
    expect(fenced.map((policy) => policy.name)).toEqual(await tables());
  });

  test('an index begins with the columns of each foreign key', async () => {
    const missing = await rows(
      `select k.conrelid::regclass::text as table, k.conname from pg_constraint k
       join pg_class c on c.oid = k.conrelid join pg_namespace n on n.oid = c.relnamespace
       where k.contype = 'f' and n.nspname = 'public' and not c.relispartition
         and not exists (select 1 from pg_index i where i.indrelid = k.conrelid
           and (i.indkey::int2[])[0:cardinality(k.conkey) - 1] @> k.conkey
           and k.conkey @> (i.indkey::int2[])[0:cardinality(k.conkey) - 1])`,
    );
    expect(missing).toEqual([]);
  });
});

describe('the role the program works as', () => {
  test('owns nothing, passes nothing, makes nothing', async () => {
    const [role] = await rows(
      `select rolsuper, rolbypassrls, rolcreatedb, rolcreaterole, rolcanlogin from pg_roles where rolname = 'ovenbird_app'`,
    );
    expect(role).toEqual({
      rolsuper: false,
      rolbypassrls: false,
      rolcreatedb: false,
      rolcreaterole: false,
      rolcanlogin: false,
    });
    const owned = await rows(
      `select relname from pg_class where relowner = 'ovenbird_app'::regrole union all
       select proname from pg_proc where proowner = 'ovenbird_app'::regrole`,
    );
    expect(owned).toEqual([]);
  });

  test('is who asks, on every connection', async () => {
    const asked = await Promise.all(
      Array.from({ length: 5 }, () => app.deps.db.raw<{ rows: unknown[] }>('select current_user as name')),
    );
    expect(asked.map((answer) => answer.rows)).toEqual(Array(5).fill([{ name: 'ovenbird_app' }]));
  });

  test.each([
    'create table mine (id int)',
    'create function mine() returns int language sql as $$ select 1 $$',
    'drop table job',
    'alter table job disable row level security',
    'alter table job add column mine int',
    'truncate job',
    'create policy mine on job using (true)',
    'delete from change',
    `update change set kind = 'nothing'`,
    'select * from knex_migrations',
    'select fence_tenant_table(null)',
  ])('may not: %s', async (sql) => {
    await expect(app.deps.db.raw(sql)).rejects.toMatchObject({ code: '42501' });
  });
});

describe('row level security alone, where a query forgot its shop', () => {
  let home: string;
  beforeAll(async () => {
    const shop = await aShop(app.deps.db);
    home = shop.id;
    const job = await aJob(app.deps.db, shop);
    await aBooking(app.deps.db, shop, {
      stage: job.stages[0] ?? '',
      place: shop.booth,
      from: new Date('2026-03-10T08:00:00Z'),
      phases: [60],
    });
    await makeMember(owner, shop, { role: 'owner' });
  });

  const counted = async (db: Knex) => {
    const counts: Record<string, number> = {};
    for (const table of ['shop', 'job', 'stage', 'booking', 'occupancy', 'person', 'place', 'membership'])
      counts[table] = (await db(table).select(db.raw('1'))).length;
    return counts;
  };
  const nothing = { shop: 0, job: 0, stage: 0, booking: 0, occupancy: 0, person: 0, place: 0, membership: 0 };

  test('without a shop there is nothing', async () => {
    expect((await counted(owner))['job']).toBeGreaterThan(0);
    expect(await counted(app.deps.db)).toEqual(nothing);
  });

  test('in another shop there is nothing of this one, to read, to change or to delete', async () => {
    const other = await makeShop(owner);
    await inShop(app.deps.db, { shopId: other.id, accountId: null }, async (trx) => {
      expect(await counted(trx)).toEqual({ ...nothing, shop: 1 });
      expect(await trx('job').update({ title: 'mine' })).toBe(0);
      expect(await trx('occupancy').delete()).toBe(0);
    });
    expect(await owner('job').where({ title: 'mine' })).toEqual([]);
  });

  test('a row cannot be put into another shop, nor moved there', async () => {
    const other = await makeShop(owner);
    const intoHome = inShop(app.deps.db, { shopId: other.id, accountId: null }, (trx) =>
      trx('zone').insert({ shop_id: home, id: other.id, name: 'Zone' }),
    );
    await expect(intoHome).rejects.toMatchObject({ code: '42501' });
    const moved = inShop(app.deps.db, { shopId: home, accountId: null }, (trx) =>
      trx('person').update({ shop_id: other.id }),
    );
    await expect(moved).rejects.toMatchObject({ code: '42501' });
  });

  test('a connection forgets its shop when the transaction ends', async () => {
    const single = await testApp(database, { env: { DATABASE_POOL: '2' } });
    await inShop(single.deps.db, { shopId: home, accountId: null }, (trx) => trx('job').select('id'));
    const settings = await Promise.all(
      Array.from({ length: 8 }, () =>
        single.deps.db.raw<{ rows: unknown[] }>(`select nullif(current_setting('app.shop_id', true), '') as shop`),
      ),
    );
    expect(settings.flatMap((answer) => answer.rows)).toEqual(Array(8).fill({ shop: null }));
    await single.close();
  });
});
