import { ping } from '../db/ping.ts';
import type { Deps } from '../deps.ts';

/** Resolves when the database answers; else its error says why. */
export const checkHealth = (deps: Deps): Promise<void> => ping(deps.db);
