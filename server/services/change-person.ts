import { isDeepStrictEqual } from 'node:util';
import type { PersonFields } from '#contracts/people.ts';
import { recordChange } from '../db/changes.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { findPerson, lockPerson, replaceShifts, tieMember, updatePerson, type PersonRow } from '../db/people.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { noSuchMember } from './create-person.ts';
import { clashesOf, personInShop } from './person-view.ts';

/** Each field that is given or undefined. */
export type PersonChange = { [K in keyof PersonFields]?: PersonFields[K] | undefined };

/**
 * Changes the fields that are given. What says the same as before changes nothing. Posted work that no longer fits the
 * hours is told, not moved.
 * @throws {Refusal} not-found; stale with the person as it is now; bad-request where the member is not of this shop
 */
export function changePerson(deps: Deps, actor: Actor, id: string, input: PersonChange & { version: number }) {
  const { version, ...given } = input;
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const before = await lockedPerson(trx, shopId, id);
    const fields = differing(before, given);
    if (Object.keys(fields).length > 0) {
      if (before.version !== version)
        throw new Refusal('stale', { current: await personInShop(trx, shopId, id, deps.now()) });
      await putPerson(trx, shopId, id, fields);
      await recordChange(trx, actor, { kind: 'people-changed', ids: [id], detail: beforeAndAfter(before, fields) });
    }
    return {
      person: await personInShop(trx, shopId, id, deps.now()),
      clashes: await clashesOf(trx, shopId, id, deps.now()),
    };
  });
}

/** @throws {Refusal} not-found */
export async function lockedPerson(trx: Trx, shopId: string, id: string): Promise<PersonRow> {
  await lockPerson(trx, shopId, id);
  const row = await findPerson(trx, shopId, id);
  if (!row) throw notFound();
  return row;
}

/** Writes what is given. Also what an import does for each line. */
export async function putPerson(trx: Trx, shopId: string, id: string, fields: PersonChange): Promise<void> {
  const { name, skills, sprayTrainedOn } = fields;
  await updatePerson(trx, shopId, id, {
    ...(name === undefined ? {} : { name }),
    ...(skills === undefined ? {} : { skills }),
    ...(sprayTrainedOn === undefined ? {} : { sprayTrainedOn }),
  });
  if (fields.shifts !== undefined) await replaceShifts(trx, shopId, id, fields.shifts);
  if (fields.memberId !== undefined && !(await tieMember(trx, shopId, id, fields.memberId))) throw noSuchMember();
}

/** Only what is given and not as it was. */
export function differing(before: PersonRow, given: PersonChange): PersonChange {
  const was = { ...before, memberId: before.member?.id ?? null };
  return Object.fromEntries(
    Object.entries(given).filter(
      ([field, value]) => value !== undefined && !isDeepStrictEqual(value, was[field as keyof PersonFields]),
    ),
  );
}

const beforeAndAfter = (before: PersonRow, fields: PersonChange) => ({
  before: Object.fromEntries(
    Object.keys(fields).map((field) => [
      field,
      field === 'memberId' ? (before.member?.id ?? null) : before[field as Exclude<keyof PersonFields, 'memberId'>],
    ]),
  ),
  after: fields,
});
