import type { BodyOf } from '#contracts/endpoint.ts';
import type { changeMember as contract, Member } from '#contracts/session.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { lockShop } from '../db/locks.ts';
import { countOtherOwners, findMember, updateMember } from '../db/members.ts';
import { tellSessionEnded } from '../db/sessions.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';

/**
 * Gives a member another role, or disables or enables it. Counts at the member's next request; live streams end.
 * @throws {Refusal} not-found, or refused (last-owner) where nobody would be left to run the shop
 */
export function changeMember(
  deps: Deps,
  actor: Actor,
  memberId: string,
  changed: BodyOf<typeof contract>,
): Promise<Member> {
  return inShop(deps.db, actor, async (trx) => {
    // One at a time, or two owners could each take the other's place away.
    await lockShop(trx, actor.shopId);
    const before = await findMember(trx, actor.shopId, memberId);
    if (!before) throw notFound();
    const role = changed.role ?? before.role;
    const disabled = changed.disabled ?? before.disabled;
    if (role === before.role && disabled === before.disabled) return before;
    if ((role !== 'owner' || disabled) && before.role === 'owner' && !before.disabled)
      if ((await countOtherOwners(trx, actor.shopId, memberId)) === 0) throw lastOwner(before);
    await updateMember(trx, actor.shopId, memberId, { role, disabledAt: disabled ? deps.now() : null });
    await tellSessionEnded(trx, before.accountId);
    const detail = { before: { role: before.role, disabled: before.disabled }, after: { role, disabled } };
    await recordChange(trx, actor, { kind: 'member-changed', ids: [before.accountId], detail });
    return { ...before, role, disabled };
  });
}

const lastOwner = (owner: Member): Refusal =>
  new Refusal('refused', {
    reasons: [
      { code: 'last-owner', rule: null, stageId: null, ids: [owner.id], names: [owner.name], at: [], minutes: [] },
    ],
  });
