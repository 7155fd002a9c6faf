import pg from 'pg';
import type { Logger } from 'pino';
import { asAppRole } from '../db/plain-pool.ts';

export type Listener = { isListening(): boolean; close(): Promise<void> };

type Options = {
  url: string;
  channels: readonly string[];
  log: Logger;
  onNotice: (channel: string, payload: string) => void;
  /** Called each time it hears again: what was told in between has to be looked up. */
  onListening: () => void;
};

const firstDelay = 250;
const longestDelay = 5_000;
const checkEvery = 20_000;

/**
 * Hears NOTIFY on a connection of its own, straight to the server (a pooler in between would swallow it), and connects
 * again when that is lost. A connection that is dead without a word is found out by asking it now and then.
 */
export function listen(options: Options): Listener {
  let client: pg.Client | null = null;
  let delay = firstDelay;
  let timer: NodeJS.Timeout | undefined;
  let closed = false;

  /** A connection may be told lost in several ways; the first one counts. */
  const given = new WeakSet<pg.Client>();
  const lost = (dead: pg.Client, error?: Error) => {
    if (given.has(dead)) return;
    given.add(dead);
    dead.end().catch(() => undefined); // it is lost anyway
    if (closed) return;
    client = null;
    options.log.warn({ err: error }, 'not listening to the database; trying again');
    clearTimeout(timer);
    timer = setTimeout(() => void open(), delay * (0.5 + Math.random()));
    delay = Math.min(delay * 2, longestDelay);
  };

  const check = (alive: pg.Client) => {
    timer = setTimeout(() => {
      alive.query('select 1').then(
        () => alive === client && check(alive),
        (error: Error) => lost(alive, error),
      );
    }, checkEvery);
  };

  async function open(): Promise<void> {
    const opening = new pg.Client({
      ...asAppRole(options.url),
      keepAlive: true,
      connectionTimeoutMillis: 5_000,
      query_timeout: 5_000,
    });
    opening.on('error', (error) => lost(opening, error));
    opening.on('end', () => lost(opening));
    opening.on('notification', ({ channel, payload }) => options.onNotice(channel, payload ?? ''));
    try {
      await opening.connect();
      for (const channel of options.channels) await opening.query(`listen ${pg.escapeIdentifier(channel)}`);
    } catch (error) {
      return lost(opening, error instanceof Error ? error : new Error(String(error)));
    }
    if (closed) return opening.end();
    client = opening;
    delay = firstDelay;
    check(opening);
    options.onListening();
  }

  void open();
  return {
    isListening: () => client !== null,
    close: async () => {
      closed = true;
      clearTimeout(timer);
      await client?.end();
      client = null;
    },
  };
}
