import knexFactory, { type Knex } from 'knex';
import pg from 'pg';

export const APP_ROLE = 'ovenbird_app';

// bigint counts of this program stay far below 2^53, and numeric columns hold measures with two decimals.
pg.types.setTypeParser(pg.types.builtins.INT8, Number);
pg.types.setTypeParser(pg.types.builtins.NUMERIC, Number);
// A date is a day of the calendar, not an instant.
pg.types.setTypeParser(pg.types.builtins.DATE, (text) => text);

/** Whoever connects, the program works as the role that owns nothing, so that row level security always binds. */
export const dropToAppRole = (url: string): string | null =>
  new URL(url).username === APP_ROLE ? null : `set role ${APP_ROLE}`;

type PoolConnection = { query(sql: string, done: (error: Error | null) => void): void };

/** The pool all SQL of the program goes through. Statements over 15 s and idle transactions over 60 s are ended. */
export function connect(url: string, poolSize: number): Knex {
  const setRole = dropToAppRole(url);
  return knexFactory({
    client: 'pg',
    connection: {
      connectionString: url,
      statement_timeout: 15_000,
      idle_in_transaction_session_timeout: 60_000,
      connectionTimeoutMillis: 2_000,
    },
    acquireConnectionTimeout: 2_000,
    // What fails reaches who asked for it; the library would print it as well, past our log.
    log: { warn: () => undefined, error: () => undefined },
    pool: {
      min: 0,
      max: poolSize,
      afterCreate: (connection: PoolConnection, done: (error: Error | null, connection: PoolConnection) => void) => {
        if (setRole === null) done(null, connection);
        else connection.query(setRole, (error) => done(error, connection));
      },
    },
  });
}
