import { tellSessionEnded } from '../db/sessions.ts';
import type { Deps } from '../deps.ts';

/** Lets every process look again which live streams of the account still have a session. */
export const signOut = (deps: Deps, accountId: string): Promise<void> => tellSessionEnded(deps.db, accountId);
