import { v7 as uuid } from 'uuid';
import type { BodyOf } from '#contracts/endpoint.ts';
import type { invite as contract } from '#contracts/session.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { queueLetter } from '../db/letters.ts';
import { findMemberByEmail, isPersonOfShop } from '../db/members.ts';
import { insertInvitation, withdrawInvitations } from '../db/tokens.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';

const goodFor = 7 * 86_400_000;

/**
 * Invites an address into the shop; an earlier open invitation of it ends. The link is made when the letter is sent.
 * @throws {Refusal} taken where the address is an active member's, bad-request where the person is not of this shop
 */
export function invite(deps: Deps, actor: Actor, given: BodyOf<typeof contract>): Promise<{ id: string }> {
  return inShop(deps.db, actor, async (trx) => {
    const member = await findMemberByEmail(trx, actor.shopId, given.email);
    if (member && !member.disabled) throw new Refusal('taken');
    if (given.personId !== null && !(await isPersonOfShop(trx, actor.shopId, given.personId)))
      throw new Refusal('bad-request', {
        fields: [{ path: 'body.personId', message: 'is not a person of this shop' }],
      });
    const id = uuid();
    const now = deps.now();
    await withdrawInvitations(trx, actor.shopId, given.email, now);
    await insertInvitation(trx, {
      ...given,
      id,
      shopId: actor.shopId,
      expiresAt: new Date(now.getTime() + goodFor),
      createdBy: actor.accountId,
    });
    await queueLetter(trx, actor, {
      kind: 'invitation',
      accountId: member?.accountId ?? null,
      toEmail: given.email,
      subjectId: id,
      subjectVersion: 1,
      data: { invitationId: id },
    });
    await recordChange(trx, actor, { kind: 'member-invited', ids: [id], detail: { role: given.role } });
    return { id };
  });
}
