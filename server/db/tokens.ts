import type { Knex } from 'knex';
import type { Role } from '#contracts/common.ts';

export type InvitationRow = {
  id: string;
  email: string;
  shopId: string;
  role: Role;
  personId: string | null;
  expiresAt: Date;
};

const invitationColumns = {
  id: 'id',
  email: 'email',
  shopId: 'shop_id',
  role: 'role',
  personId: 'person_id',
  expiresAt: 'expires_at',
};

/** A reset link; when its letter is sent again the time it is good for begins anew. */
export async function putReset(
  db: Knex,
  reset: { id: string; accountId: string; email: string; hash: Buffer; expiresAt: Date },
): Promise<void> {
  await db('account_token')
    .insert({
      id: reset.id,
      kind: 'reset',
      account_id: reset.accountId,
      email: reset.email,
      token_hash: reset.hash,
      expires_at: reset.expiresAt,
    })
    .onConflict('id')
    .merge(['token_hash', 'expires_at']);
}

/** The account a reset link is for; undefined where it is unknown, used or too old. */
export async function findOpenReset(db: Knex, hash: Buffer, now: Date): Promise<string | undefined> {
  const row = await db('account_token')
    .where({ kind: 'reset', token_hash: hash, used_at: null })
    .andWhere('expires_at', '>', now)
    .first<{ accountId: string } | undefined>({ accountId: 'account_id' });
  return row?.accountId;
}

/** Uses up a reset link and all others of its account. Of two at the same time one gets `true`. */
export async function useReset(db: Knex, hash: Buffer, accountId: string, now: Date): Promise<boolean> {
  const used = await db('account_token')
    .where({ kind: 'reset', token_hash: hash, used_at: null })
    .andWhere('expires_at', '>', now)
    .update({ used_at: now });
  await db('account_token').where({ kind: 'reset', account_id: accountId, used_at: null }).update({ used_at: now });
  return used === 1;
}

export async function insertInvitation(db: Knex, invitation: InvitationRow & { createdBy: string }): Promise<void> {
  await db('account_token').insert({
    id: invitation.id,
    kind: 'invitation',
    email: invitation.email,
    shop_id: invitation.shopId,
    role: invitation.role,
    person_id: invitation.personId,
    expires_at: invitation.expiresAt,
    created_by: invitation.createdBy,
  });
}

/** Ends what invitations of this address to the shop are still open. */
export async function withdrawInvitations(db: Knex, shopId: string, email: string, now: Date): Promise<void> {
  await db('account_token')
    .where({ kind: 'invitation', shop_id: shopId, email, used_at: null })
    .andWhere('expires_at', '>', now)
    .update({ expires_at: now });
}

const openInvitations = (db: Knex, now: Date) =>
  db('account_token').where({ kind: 'invitation', used_at: null }).andWhere('expires_at', '>', now);

export const findOpenInvitation = (db: Knex, hash: Buffer, now: Date): Promise<InvitationRow | undefined> =>
  openInvitations(db, now).andWhere({ token_hash: hash }).first<InvitationRow | undefined>(invitationColumns);

export const findOpenInvitationById = (
  db: Knex,
  shopId: string,
  id: string,
  now: Date,
): Promise<InvitationRow | undefined> =>
  openInvitations(db, now).andWhere({ shop_id: shopId, id }).first<InvitationRow | undefined>(invitationColumns);

export const listOpenInvitations = (db: Knex, shopId: string, now: Date): Promise<InvitationRow[]> =>
  openInvitations(db, now)
    .andWhere({ shop_id: shopId })
    .orderBy('created_at')
    .select<InvitationRow[]>(invitationColumns);

export async function setInvitationHash(db: Knex, shopId: string, id: string, hash: Buffer): Promise<void> {
  await db('account_token').where({ kind: 'invitation', shop_id: shopId, id }).update({ token_hash: hash });
}

/** Uses up an invitation; of two at the same time one gets `true`. */
export async function useInvitation(db: Knex, hash: Buffer, now: Date): Promise<boolean> {
  const used = await openInvitations(db, now).andWhere({ token_hash: hash }).update({ used_at: now });
  return used === 1;
}
