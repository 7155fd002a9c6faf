import type { Knex } from 'knex';

/** Tells the processes that hold live streams to look again whose session still stands. */
export const SESSION_CHANNEL = 'ovenbird_session';

export async function touchSession(db: Knex, sid: string, at: Date): Promise<void> {
  await db('session')
    .where({ sid })
    .update({ sess: db.raw(`jsonb_set(sess, '{seenAt}', to_jsonb(?::bigint))`, [at.getTime()]) });
}

/** Ends the sessions of an account. Its live streams end too, in every process. */
export async function endSessionsOf(db: Knex, accountId: string): Promise<void> {
  await db('session').where({ account_id: accountId }).delete();
  await tellSessionEnded(db, accountId);
}

export type SessionRow = { accountId: string | null; signedInAt: number | null; seenAt: number | null };

/** @returns whose session it is and when it was used; undefined where it was ended */
export function findSession(db: Knex, sid: string): Promise<SessionRow | undefined> {
  return db('session')
    .where({ sid })
    .first(
      'account_id as accountId',
      db.raw(`(sess ->> 'signedInAt')::bigint as "signedInAt"`),
      db.raw(`(sess ->> 'seenAt')::bigint as "seenAt"`),
    );
}

export async function tellSessionEnded(db: Knex, accountId: string): Promise<void> {
  await db.raw(`select pg_notify(?, ?)`, [SESSION_CHANNEL, accountId]);
}
