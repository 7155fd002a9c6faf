import type { Role } from '#contracts/common.ts';
import type { Member } from '#contracts/session.ts';
import type { Trx } from './in-shop.ts';

const members = (trx: Trx, shopId: string) =>
  trx('membership')
    .join('account', 'account.id', 'membership.account_id')
    .where({ 'membership.shop_id': shopId })
    .select<Member[]>(
      'membership.id as id',
      'account.id as accountId',
      'account.name as name',
      'account.email as email',
      'membership.role as role',
      'membership.person_id as personId',
      trx.raw('(membership.disabled_at is not null or account.disabled_at is not null) as disabled'),
    );

export const listMembers = (trx: Trx, shopId: string): Promise<Member[]> =>
  members(trx, shopId).orderBy(['account.name', 'membership.id']);

export async function findMember(trx: Trx, shopId: string, id: string): Promise<Member | undefined> {
  const [member] = await members(trx, shopId).andWhere({ 'membership.id': id });
  return member;
}

export async function findMemberByEmail(trx: Trx, shopId: string, email: string): Promise<Member | undefined> {
  const [member] = await members(trx, shopId).andWhere({ 'account.email': email });
  return member;
}

export async function countOtherOwners(trx: Trx, shopId: string, id: string): Promise<number> {
  const owners = await members(trx, shopId).andWhere({ 'membership.role': 'owner' }).whereNot({ 'membership.id': id });
  return owners.filter((owner) => !owner.disabled).length;
}

/** A member of the shop; who was one before and is invited again comes back with the new role. */
export async function putMember(
  trx: Trx,
  shopId: string,
  member: { id: string; accountId: string; role: Role; personId: string | null },
): Promise<void> {
  await trx('membership')
    .insert({
      shop_id: shopId,
      id: member.id,
      account_id: member.accountId,
      role: member.role,
      person_id: member.personId,
    })
    .onConflict(['shop_id', 'account_id'])
    .merge({ role: member.role, person_id: member.personId, disabled_at: null });
}

export async function updateMember(
  trx: Trx,
  shopId: string,
  id: string,
  changed: { role: Role; disabledAt: Date | null },
): Promise<void> {
  await trx('membership')
    .where({ shop_id: shopId, id })
    .update({ role: changed.role, disabled_at: changed.disabledAt });
}

export async function findShopName(trx: Trx, shopId: string): Promise<string | undefined> {
  const shop = await trx('shop').where({ id: shopId }).first<{ name: string } | undefined>('name');
  return shop?.name;
}

export async function isPersonOfShop(trx: Trx, shopId: string, id: string): Promise<boolean> {
  const people = await trx('person')
    .where({ shop_id: shopId, id })
    .whereNull('retired_at')
    .select<{ id: string }[]>('id');
  return people.length === 1;
}
