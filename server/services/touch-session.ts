import * as sessions from '../db/sessions.ts';
import type { Deps } from '../deps.ts';

/** Notes that a session was in use just now. Changes nothing when it was ended meanwhile. */
export const touchSession = (deps: Deps, sid: string): Promise<void> => sessions.touchSession(deps.db, sid, deps.now());
