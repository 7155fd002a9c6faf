import { v7 as uuid } from 'uuid';
import type { Person } from '#contracts/people.ts';
import { deleteAbsence, insertAbsence } from '../db/absences.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { lockedPerson } from './change-person.ts';
import { clashesOf, personInShop } from './person-view.ts';

type Given = { from: string; to: string | null; reason: string };

/** Somebody is away. Posted work in that time is told, not moved: the lead plans again. The same absence twice is one. */
export function addAbsence(deps: Deps, actor: Actor, personId: string, given: Given) {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const person = await lockedPerson(trx, shopId, personId);
    const from = new Date(given.from);
    const to = given.to === null ? null : new Date(given.to);
    const isThere = person.absences.some(
      (one) =>
        Date.parse(one.from) === from.getTime() &&
        (one.to === null ? null : Date.parse(one.to)) === (to?.getTime() ?? null),
    );
    if (!isThere) {
      const id = uuid();
      await insertAbsence(trx, shopId, personId, { id, from, to, reason: given.reason });
      // The reason may be an illness: the history says that somebody is away and when, not why.
      const detail = { away: { name: person.name, from: given.from, to: given.to } };
      await recordChange(trx, actor, { kind: 'people-changed', ids: [personId, id], detail });
    }
    return {
      person: await personInShop(trx, shopId, personId, deps.now()),
      clashes: await clashesOf(trx, shopId, personId, deps.now()),
    };
  });
}

/** @throws {Refusal} not-found */
export function removeAbsence(deps: Deps, actor: Actor, personId: string, absenceId: string): Promise<Person> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const person = await lockedPerson(trx, shopId, personId);
    if (!(await deleteAbsence(trx, shopId, personId, absenceId))) throw notFound();
    const detail = { backAgain: person.name };
    await recordChange(trx, actor, { kind: 'people-changed', ids: [personId, absenceId], detail });
    return personInShop(trx, shopId, personId, deps.now());
  });
}
