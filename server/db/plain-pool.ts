import pg from 'pg';
import { APP_ROLE, dropToAppRole } from './connect.ts';

/** As the role the program works as, told with the connection itself, so that it costs no round trip. */
export const asAppRole = (url: string): pg.ClientConfig => ({
  connectionString: url,
  ...(dropToAppRole(url) !== null && { options: `-c role=${APP_ROLE}` }),
});

/** A few connections of their own for sessions and rate limits: a busy page cannot keep people from signing in. */
export function openPlainPool(url: string, size: number, onError: (error: Error) => void): pg.Pool {
  const pool = new pg.Pool({
    ...asAppRole(url),
    max: size,
    statement_timeout: 5_000,
    connectionTimeoutMillis: 2_000,
  });
  // An idle connection that the database server closes would otherwise end the process.
  pool.on('error', onError);
  return pool;
}
