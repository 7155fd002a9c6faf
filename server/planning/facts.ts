import type { CoatingSheet } from '#contracts/coatings.ts';
import { loadAir, type AirOfShop } from '#server/db/air.ts';
import { everyCoating } from '#server/db/coatings.ts';
import type { Booked, Booking } from '#server/db/bookings.ts';
import { loadOpenBookings } from '#server/db/bookings.ts';
import { findOpenDraft, loadDraftItems, type Draft, type DraftItem } from '#server/db/drafts.ts';
import type { Trx } from '#server/db/in-shop.ts';
import { loadOpenJobs, type OpenJob, type OpenStage } from '#server/db/open-jobs.ts';
import { loadResources, type Resources } from '#server/db/resources.ts';

/** Everything a planning problem is built from, as it is at one moment. Maps are by stage. */
export type Facts = {
  now: Date;
  resources: Resources;
  jobs: OpenJob[];
  bookings: Map<string, Booking>;
  draft: Draft | null;
  /** Items of the open draft; empty where there is none. */
  items: Map<string, DraftItem>;
  air: AirOfShop;
  /** Data sheets by coating. */
  coatings: Map<string, CoatingSheet>;
};

const byStage = <T extends Booked>(list: readonly T[]): Map<string, T> => new Map(list.map((b) => [b.stageId, b]));

/** Seven statements, whatever the shop's size. */
export async function loadFacts(trx: Trx, shopId: string, now: Date): Promise<Facts> {
  const resources = await loadResources(trx, shopId);
  const jobs = await loadOpenJobs(trx, shopId);
  const bookings = byStage(await loadOpenBookings(trx, shopId));
  const draft = (await findOpenDraft(trx, shopId, { lock: false })) ?? null;
  const items = byStage(draft ? await loadDraftItems(trx, shopId, draft.id) : []);
  const air = await loadAir(trx, shopId);
  const coatings = new Map((await everyCoating(trx, shopId)).map(({ id, sheet }) => [id, sheet]));
  return { now, resources, jobs, bookings, draft, items, air, coatings };
}

/**
 * Where a stage stands: what has begun stands where it happened, whatever a draft says; else the open draft counts, and
 * without one the posted plan.
 */
export function standingOf(facts: Pick<Facts, 'bookings' | 'draft' | 'items'>, stage: OpenStage): Booked | null {
  if (stage.state !== 'waiting' || facts.draft === null) return facts.bookings.get(stage.id) ?? null;
  return facts.items.get(stage.id) ?? null;
}

/** Whether two bookings mean the same to everybody: time, place, hands, lamps and way. */
export function sameBooking(a: Booked, b: Booked): boolean {
  return (
    a.way === b.way &&
    a.placeId === b.placeId &&
    a.personId === b.personId &&
    a.from.getTime() === b.from.getTime() &&
    a.to.getTime() === b.to.getTime() &&
    String(a.phases) === String(b.phases) &&
    String([...a.lampIds].sort()) === String([...b.lampIds].sort())
  );
}
