import { findSession } from '../db/sessions.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';
import { findActor } from './find-signed-in.ts';

/** Who looks on by this session, read anew; undefined once it was ended, ran out, or the account left the shop. */
export async function checkStream(
  deps: Deps,
  stream: { sid: string; accountId: string; shopId: string },
): Promise<Actor | undefined> {
  const session = await findSession(deps.db, stream.sid);
  if (session?.accountId !== stream.accountId) return undefined;
  const now = deps.now().getTime();
  if (now - (session.signedInAt ?? 0) > deps.config.SESSION_ABSOLUTE_HOURS * 3_600_000) return undefined;
  if (now - (session.seenAt ?? 0) > deps.config.SESSION_IDLE_MINUTES * 60_000) return undefined;
  return findActor(deps, stream.accountId, stream.shopId);
}
