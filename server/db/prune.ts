import type { Knex } from 'knex';

const day = 86_400_000;

/**
 * Forgets what is of no more use: sessions that ran out, links a month after their end, tasks done two weeks ago or given up three
 * months ago, rate limits that ran out. Makes the partitions of history and air readings of the months to come. Keys of requests are
 * forgotten by their shops as they go (services/once.ts): only a shop may see its rows.
 */
export async function prune(db: Knex, now: Date): Promise<Record<string, number>> {
  const ago = (days: number) => new Date(now.getTime() - days * day);
  const sessions = await db('session').where('expire', '<', now).delete();
  const links = await db('account_token').where('expires_at', '<', ago(30)).delete();
  const done = await db('task').where('done_at', '<', ago(14)).delete();
  const dead = await db('task').where('dead_at', '<', ago(90)).delete();
  const limits = await db('rate_limit').where('expire', '<', now.getTime()).delete();
  await db.raw('select make_change_partitions(3), make_air_partitions(3)');
  return { sessions, links, tasks: done + dead, limits };
}
