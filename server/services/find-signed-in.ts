import { findAccount, type AccountRow } from '../db/accounts.ts';
import { findMembership } from '../db/memberships.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';

export type SignedInAccount = AccountRow;

/** The account a session speaks of; undefined once it is disabled or gone, so that it is out at its next request. */
export async function findSignedIn(deps: Deps, accountId: string): Promise<SignedInAccount | undefined> {
  const account = await findAccount(deps.db, accountId);
  return account?.disabledAt === null ? account : undefined;
}

/** Who an account is in a shop; undefined where it is no member, was disabled, or there is no such shop. */
export async function findActor(deps: Deps, accountId: string, shopId: string): Promise<Actor | undefined> {
  const membership = await findMembership(deps.db, { accountId, shopId });
  return membership && { accountId, shopId, role: membership.role, personId: membership.personId };
}
