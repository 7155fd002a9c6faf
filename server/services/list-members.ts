import type * as z from 'zod';
import type { listMembers as contract } from '#contracts/session.ts';
import { inShop } from '../db/in-shop.ts';
import * as rows from '../db/members.ts';
import { listOpenInvitations } from '../db/tokens.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';

/** The shop's members, disabled ones too, and the invitations nobody has answered yet. */
export function listMembers(deps: Deps, actor: Actor): Promise<z.input<(typeof contract)['reply']>> {
  return inShop(deps.db, actor, async (trx) => {
    const members = await rows.listMembers(trx, actor.shopId);
    const open = await listOpenInvitations(trx, actor.shopId, deps.now());
    const invitations = open.map(({ id, email, role, expiresAt }) => ({
      id,
      email,
      role,
      expiresAt: expiresAt.toISOString(),
    }));
    return { members, invitations };
  });
}
