import type { Knex } from 'knex';
import type { Logger } from 'pino';
import type { Config } from './config.ts';
import type { Storage } from './storage/storage.ts';

/** What services are handed: everything that reaches outside the process, and the clock. */
export type Deps = {
  config: Config;
  db: Knex;
  log: Logger;
  now: () => Date;
  /** Bytes of the files that people put in. */
  storage: Storage;
  /** What a password's hash costs; absent everywhere but in tests, which would spend most of their time on it. */
  passwordCost?: { memoryCost: number; timeCost: number; parallelism: number };
};
