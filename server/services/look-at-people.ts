import { trainingStanding } from '#chemistry/training/spray-training.ts';
import { listAccountIds } from '../db/accounts.ts';
import { recordChange } from '../db/changes.ts';
import { asAccount, inShop, type Scope, type Trx } from '../db/in-shop.ts';
import { queueLetter } from '../db/letters.ts';
import { listOwnShops } from '../db/own-shops.ts';
import { findShopFrame, loadPeople, updatePerson, type PersonRow } from '../db/people.ts';
import { membersOfRoles } from '../db/whom-to-tell.ts';
import type { Deps } from '../deps.ts';
import { localDayOf } from '../planning/local-time.ts';

/**
 * The daily look: a training that runs out within 90 days is written to owners and leads, once; who has had their last day
 * is off the roster. Shops are found through the accounts of those who are told: nothing sees all shops at once.
 */
export async function lookAtPeople(deps: Deps): Promise<void> {
  const shops = new Set<string>();
  for (const accountId of await listAccountIds(deps.db)) {
    const own = await asAccount(deps.db, accountId, (trx) => listOwnShops(trx, accountId));
    for (const { id, role } of own) if (role === 'owner' || role === 'lead') shops.add(id);
  }
  for (const shopId of shops) await lookAtShop(deps, shopId);
}

function lookAtShop(deps: Deps, shopId: string): Promise<void> {
  const scope: Scope = { shopId, accountId: null };
  return inShop(deps.db, scope, async (trx) => {
    const { timeZone } = await findShopFrame(trx, shopId);
    const today = localDayOf(deps.now(), timeZone);
    const people = (await loadPeople(trx, shopId)).filter(({ retired }) => !retired);
    await retireWhoHasLeft(trx, scope, people, { today, now: deps.now() });
    for (const person of people) await tellTrainingEnds(trx, scope, person, today);
  });
}

async function retireWhoHasLeft(
  trx: Trx,
  scope: Scope,
  people: readonly PersonRow[],
  { today, now }: { today: string; now: Date },
): Promise<void> {
  const gone = people.filter(({ leavesOn }) => leavesOn !== null && leavesOn < today);
  for (const { id } of gone) await updatePerson(trx, scope.shopId, id, { retiredAt: now });
  const detail = { retired: gone.map(({ name }) => name) };
  if (gone.length > 0)
    await recordChange(trx, scope, { kind: 'people-changed', ids: gone.map(({ id }) => id), detail });
}

/** The letter's version is the last good day: a new training that ends is told anew, the same one never twice. */
async function tellTrainingEnds(trx: Trx, scope: Scope, person: PersonRow, today: string): Promise<void> {
  const standing = trainingStanding(person.sprayTrainedOn, today);
  const leavesBefore = person.leavesOn !== null && 'goodThrough' in standing && person.leavesOn <= standing.goodThrough;
  if (standing.code !== 'ends-soon' || leavesBefore) return;
  for (const { accountId, email } of await membersOfRoles(trx, scope.shopId, ['owner', 'lead']))
    await queueLetter(trx, scope, {
      kind: 'training-ends',
      accountId,
      toEmail: email,
      subjectId: person.id,
      subjectVersion: Number(standing.goodThrough.replaceAll('-', '')),
      data: { personName: person.name, goodThrough: standing.goodThrough },
    });
}
