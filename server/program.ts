import { pino } from 'pino';
import { ConfigFault, readConfig, type Config } from './config.ts';
import { connect } from './db/connect.ts';
import type { Deps } from './deps.ts';
import { openStorage } from './storage/open-storage.ts';

/** Says in one line why a program cannot start, and ends it. */
export function fail(message: string): never {
  process.stderr.write(`${message}\n`);
  process.exit(1);
}

function configOrFail(): Config {
  try {
    return readConfig(process.env);
  } catch (error) {
    if (error instanceof ConfigFault) fail(error.message);
    throw error;
  }
}

/** What web server and worker work with, made from the environment. Logs are lines of JSON on standard output. */
export function openProgram(): Deps {
  const config = configOrFail();
  const secrets = ['password', 'currentPassword', 'newPassword', 'token', 'cookie', 'authorization'];
  const redact = [...secrets, ...secrets.map((name) => `*.${name}`), 'req.headers', 'res.headers'];
  const log = pino({ level: config.LOG_LEVEL, redact, base: null, timestamp: pino.stdTimeFunctions.isoTime });
  const db = connect(config.DATABASE_URL, config.DATABASE_POOL);
  return { config, db, log, now: () => new Date(), storage: openStorage(config) };
}
