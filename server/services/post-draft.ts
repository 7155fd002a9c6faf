import { v7 as uuid } from 'uuid';
import { cancelBookings, insertBookings, replaceBooking, type Booked } from '../db/bookings.ts';
import { recordChange } from '../db/changes.ts';
import { closeDraft } from '../db/drafts.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { queueLetter } from '../db/letters.ts';
import { lockOpenStages, lockResources, lockShop } from '../db/locks.ts';
import { insertOccupancy, releaseFrom } from '../db/occupancy.ts';
import { accountsOfPeople } from '../db/people-told.ts';
import { insertPostedPlan } from '../db/posted-plans.ts';
import { tryAgain } from '../db/try-again.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import { airOfPlan } from '../planning/air/air-of-plan.ts';
import { changesForPerson } from '../planning/changes-for-person.ts';
import { loadFacts, sameBooking, standingOf, type Facts } from '../planning/facts.ts';
import type { Judged } from '../planning/judge.ts';
import { judgeForPosting } from '../planning/judge-for-posting.ts';
import { occupancyRows } from '../planning/occupancy-rows.ts';
import { changesByPerson, planChanges, type PlanChange } from '../planning/plan-changes.ts';
import { toReasons } from '../planning/reasons.ts';
import type { Actor } from '../policies.ts';
import { groundShifts } from './ground-shifts.ts';
import { seenDraft } from './seen-draft.ts';

export type Posted = { planNumber: number; changed: number; letters: number };

/**
 * Makes the draft what everyone works by, in one transaction: bookings, what they take, the plan whole, history, and one
 * letter for each account whose work changes. Locks in the order of db/locks.ts.
 * @throws {Refusal} stale; ground-shifted with what has changed under the draft; refused with the rules it breaks.
 */
export function postDraft(deps: Deps, actor: Actor, version: number): Promise<Posted> {
  return tryAgain(() => inShop(deps.db, actor, (trx) => post(trx, actor, version, deps.now())));
}

async function post(trx: Trx, actor: Actor, version: number, now: Date): Promise<Posted> {
  await lockOpenStages(trx, actor.shopId);
  const draft = await seenDraft(trx, actor.shopId, version, { lock: true });
  await lockResources(trx, actor.shopId);
  const shop = await lockShop(trx, actor.shopId);
  const facts = await loadFacts(trx, actor.shopId, now);
  const shifts = groundShifts(facts, draft, shop.planNumber);
  if (shifts) throw new Refusal('ground-shifted', { current: shifts });
  const judged = judgeForPosting(facts);
  const { violations, cost } = judged.verdict;
  if (violations.length > 0) throw new Refusal('refused', { reasons: toReasons(facts, judged.built, violations) });

  const number = shop.planNumber + 1;
  const changes = planChanges(facts);
  const bookingIds = await writeBookings(trx, actor.shopId, number, facts);
  await writeOccupancy(trx, actor.shopId, facts, judged, bookingIds);
  const planId = uuid();
  const body = { bookings: bookedStages(facts) };
  // Moved by hand alone, it is right for the air of now in the eyes of who posts it.
  const air = draft.air ?? airOfPlan(facts.air, now);
  const plan = { id: planId, number, at: now, accountId: actor.accountId, cost, body, air };
  await insertPostedPlan(trx, actor.shopId, plan);
  await closeDraft(trx, actor.shopId, draft.id, { state: 'posted', at: now, accountId: actor.accountId });
  const letters = await writeLetters(trx, actor, facts, number, changes);
  await recordChange(trx, actor, {
    kind: 'plan-posted',
    ids: [planId, ...changes.map(({ stage }) => stage.id)],
    detail: { planNumber: number, changed: changes.length },
  });
  return { planNumber: number, changed: changes.length, letters };
}

/** Bookings by stage as the new plan has them. */
async function writeBookings(trx: Trx, shopId: string, number: number, facts: Facts): Promise<Map<string, string>> {
  const ids = new Map([...facts.bookings.values()].map(({ stageId, id }) => [stageId, id]));
  const gone: string[] = [];
  const fresh: (Booked & { id: string })[] = [];
  for (const { id: stageId, state } of facts.jobs.flatMap((job) => job.stages)) {
    if (state !== 'waiting') continue;
    const before = facts.bookings.get(stageId);
    const after = facts.items.get(stageId);
    if (before && !after) gone.push(before.id);
    if (!before && after) fresh.push({ ...after, id: uuid() });
    if (!before || !after || isKept(before, after)) continue;
    const replaced = await replaceBooking(trx, shopId, number, { ...after, id: before.id });
    if (!replaced) throw new Refusal('ground-shifted', { current: { begun: [{ stageId }] } });
  }
  await cancelBookings(trx, shopId, gone);
  await insertBookings(trx, shopId, number, fresh);
  for (const { stageId, id } of fresh) ids.set(stageId, id);
  return ids;
}

const isKept = (before: Booked, after: Booked): boolean =>
  sameBooking(before, after) && before.loadId === after.loadId && before.pinned === after.pinned;

/** Anew from now on for all that is booked: a hold may end later because the stage after it has moved. */
async function writeOccupancy(
  trx: Trx,
  shopId: string,
  facts: Facts,
  judged: Judged,
  bookingIds: ReadonlyMap<string, string>,
): Promise<void> {
  const loads = new Map(bookedStages(facts).map(({ stageId, loadId }) => [stageId, loadId]));
  const rows = occupancyRows(judged, facts.now, (stageId) => loads.get(stageId) ?? stageId).flatMap((row) => {
    const bookingId = bookingIds.get(row.stageId);
    return bookingId === undefined ? [] : [{ ...row, bookingId }];
  });
  await releaseFrom(trx, shopId, facts.now);
  await insertOccupancy(trx, shopId, rows);
}

const bookedStages = (facts: Facts): Booked[] =>
  facts.jobs.flatMap((job) => job.stages.flatMap((stage) => standingOf(facts, stage) ?? []));

async function writeLetters(
  trx: Trx,
  actor: Actor,
  facts: Facts,
  number: number,
  changes: readonly PlanChange[],
): Promise<number> {
  const byPerson = changesByPerson(changes);
  const told = await accountsOfPeople(trx, actor.shopId, [...byPerson.keys()]);
  for (const { personId, accountId, email } of told)
    await queueLetter(trx, actor, {
      kind: 'plan-changed',
      accountId,
      toEmail: email,
      subjectId: personId,
      subjectVersion: number,
      data: changesForPerson(facts, personId, number, byPerson.get(personId) ?? []),
    });
  return told.length;
}
