import type { Booked } from '#server/db/bookings.ts';
import type { PlanChangedData, PlanSlot } from '#server/db/letters.ts';
import type { Facts } from './facts.ts';
import type { PlanChange } from './plan-changes.ts';

/** The part of a posted plan's changes that one person has to know. */
export function changesForPerson(
  facts: Facts,
  personId: string,
  planNumber: number,
  changes: readonly PlanChange[],
): PlanChangedData {
  const own = (booked: Booked | null): PlanSlot | null => {
    if (booked?.personId !== personId) return null;
    const placeName = facts.resources.places.find(({ id }) => id === booked.placeId)?.name ?? '';
    return { placeName, startsAt: booked.from.toISOString(), endsAt: booked.to.toISOString() };
  };
  return {
    planNumber,
    changes: changes.map(({ job, stage, before, after }) => {
      const from = own(before);
      const to = own(after);
      const kind = from === null ? 'planned' : to === null ? 'taken-off' : 'moved';
      return { kind, jobNumber: job.number, jobTitle: job.title, stageTitle: stage.title, from, to };
    }),
  };
}
