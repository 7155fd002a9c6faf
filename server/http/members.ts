import { changeMember, invite, listMembers } from '#contracts/session.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import * as change from '../services/change-member.ts';
import * as invitation from '../services/invite.ts';
import * as list from '../services/list-members.ts';
import type { Limits } from './limits.ts';
import type { Routes } from './route.ts';

export function memberRoutes(routes: Routes, deps: Deps, limits: Limits): void {
  routes.shop(listMembers, may.setUp, ({ actor }) => list.listMembers(deps, actor));
  routes.shop(invite, may.setUp, async ({ actor, body }) => {
    await limits.invitations.take(actor.shopId);
    return invitation.invite(deps, actor, body);
  });
  routes.shop(changeMember, may.setUp, ({ actor, params, body }) =>
    change.changeMember(deps, actor, params.memberId, body),
  );
}
