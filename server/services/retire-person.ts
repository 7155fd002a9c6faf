import type { Person } from '#contracts/people.ts';
import { deleteLeaving, insertAbsence } from '../db/absences.ts';
import { recordChange } from '../db/changes.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { findShopFrame, updatePerson } from '../db/people.ts';
import { bookingsOfPerson, type BookedOfPerson } from '../db/person-booked.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import { spanOfLocalDay } from '../planning/local-time.ts';
import type { Actor } from '../policies.ts';
import { v7 as uuid } from 'uuid';
import { lockedPerson } from './change-person.ts';
import { personInShop } from './person-view.ts';

type Given = { version: number; lastDay: string | null };

/**
 * Takes somebody off the roster. Without a last day at once; with one they stay until it is over and are away from the day
 * after, so that no plan counts on them. Whose retirement stands already is left as it is.
 * @throws {Refusal} not-found; stale; refused (still-booked) with the stages, where posted work after that names them
 */
export function retirePerson(deps: Deps, actor: Actor, id: string, { version, lastDay }: Given): Promise<Person> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const before = await lockedPerson(trx, shopId, id);
    if (before.retired || (lastDay !== null && before.leavesOn === lastDay))
      return personInShop(trx, shopId, id, deps.now());
    if (before.version !== version)
      throw new Refusal('stale', { current: await personInShop(trx, shopId, id, deps.now()) });
    const { timeZone } = await findShopFrame(trx, shopId);
    const gone = lastDay === null ? deps.now() : spanOfLocalDay(lastDay, timeZone).to;
    const booked = await bookingsOfPerson(trx, shopId, id, gone);
    if (booked.length > 0) throw stillBooked(before.name, booked);
    if (before.leavesOn !== null) await deleteLeaving(trx, shopId, id, spanOfLocalDay(before.leavesOn, timeZone).to);
    if (gone > deps.now()) await leaveLater(trx, shopId, id, { lastDay, gone });
    else await updatePerson(trx, shopId, id, { retiredAt: deps.now(), leavesOn: null });
    await recordChange(trx, actor, { kind: 'people-changed', ids: [id], detail: { retired: before.name, lastDay } });
    return personInShop(trx, shopId, id, deps.now());
  });
}

async function leaveLater(
  trx: Trx,
  shopId: string,
  id: string,
  { lastDay, gone }: { lastDay: string | null; gone: Date },
): Promise<void> {
  await insertAbsence(trx, shopId, id, { id: uuid(), from: gone, to: null, reason: 'Has left' });
  await updatePerson(trx, shopId, id, { leavesOn: lastDay });
}

/** Takes a retirement back, done or to come. */
export function bringBackPerson(deps: Deps, actor: Actor, id: string, version: number): Promise<Person> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const before = await lockedPerson(trx, shopId, id);
    if (before.retired || before.leavesOn !== null) {
      if (before.version !== version)
        throw new Refusal('stale', { current: await personInShop(trx, shopId, id, deps.now()) });
      const { timeZone } = await findShopFrame(trx, shopId);
      if (before.leavesOn !== null) await deleteLeaving(trx, shopId, id, spanOfLocalDay(before.leavesOn, timeZone).to);
      await updatePerson(trx, shopId, id, { retiredAt: null, leavesOn: null });
      await recordChange(trx, actor, { kind: 'people-changed', ids: [id], detail: { broughtBack: before.name } });
    }
    return personInShop(trx, shopId, id, deps.now());
  });
}

const stillBooked = (name: string, booked: readonly BookedOfPerson[]): Refusal =>
  new Refusal('refused', {
    reasons: booked.map((one) => ({
      code: 'still-booked',
      rule: null,
      stageId: one.stageId,
      ids: [one.jobId],
      names: [name, `${one.jobNumber} ${one.jobTitle}, ${one.stageTitle}`],
      at: [one.from.toISOString(), one.to.toISOString()],
      minutes: [],
    })),
  });
