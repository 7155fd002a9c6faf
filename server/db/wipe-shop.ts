import type { Trx } from './in-shop.ts';

/** Who belongs to the shop, what was asked of it and the letters it sent outlast its contents; what only grows goes first. */
const kept = ['shop', 'membership', 'idempotency', 'letter', 'change', 'air_reading'];

/**
 * Deletes everything a demo shop holds, in an order that the foreign keys allow. The catalogue says which tables there
 * are, so that none is forgotten.
 * @throws where the shop is no demo shop
 */
export async function wipeDemo(trx: Trx, shopId: string): Promise<void> {
  await trx.raw('select forget_demo_history(?)', [shopId]);
  await trx('membership').where({ shop_id: shopId }).update({ person_id: null });
  for (const table of await tablesChildrenFirst(trx)) await trx(table).where({ shop_id: shopId }).delete();
}

async function tablesChildrenFirst(trx: Trx): Promise<string[]> {
  const { rows } = await trx.raw<{ rows: { name: string; parents: string[] }[] }>(
    `select c.relname as name,
       array(select distinct p.relname::text from pg_constraint k join pg_class p on p.oid = k.confrelid
             where k.contype = 'f' and k.conrelid = c.oid and p.oid <> c.oid) as parents
     from pg_class c
     join pg_namespace n on n.oid = c.relnamespace and n.nspname = 'public'
     join pg_attribute a on a.attrelid = c.oid and a.attname = 'shop_id' and a.attnum = 1
     where c.relkind in ('r', 'p') and not c.relispartition`,
  );
  const left = new Map(rows.filter(({ name }) => !kept.includes(name)).map(({ name, parents }) => [name, parents]));
  const ordered: string[] = [];
  while (left.size > 0) {
    const named = new Set([...left.values()].flat());
    const free = [...left.keys()].filter((name) => !named.has(name));
    if (free.length === 0) throw new Error(`Foreign keys run in a ring: ${[...left.keys()].join(', ')}`);
    for (const name of free) {
      ordered.push(name);
      left.delete(name);
    }
  }
  return ordered;
}

/** True while the shop waits to be put back or is being put back. */
export async function isBeingReset(trx: Trx, shopId: string): Promise<boolean> {
  const task = await trx('task')
    .where({ shop_id: shopId, kind: 'reset-demo', done_at: null, dead_at: null })
    .first<{ id: string } | undefined>('id');
  return task !== undefined;
}

export async function isDemo(trx: Trx, shopId: string): Promise<boolean> {
  const shop = await trx('shop').where({ id: shopId }).first<{ demo: boolean } | undefined>({ demo: 'is_demo' });
  return shop?.demo ?? false;
}
