import type { Draft } from '../db/drafts.ts';
import { sameBooking, type Facts } from '../planning/facts.ts';

/** What has changed under a draft since it was made; only what is there is named. */
export type GroundShifts = {
  /** The posted plan is another one now. */
  planNumber?: number;
  /** Stages that have begun where the posted plan had them, and which the draft has elsewhere. */
  begun?: { stageId: string; title: string; state: 'running' | 'done' }[];
  /** Places, people and lamps that were taken out of use. */
  retired?: { id: string; name: string }[];
};

/** Null where the draft still stands on the ground it grew from. */
export function groundShifts(facts: Facts, draft: Draft, planNumber: number): GroundShifts | null {
  const shifts: GroundShifts = {};
  if (draft.planNumber !== planNumber) shifts.planNumber = planNumber;
  const begun = facts.jobs.flatMap((job) =>
    job.stages.flatMap(({ id, title, state }) => {
      const item = facts.items.get(id);
      const booking = facts.bookings.get(id);
      if (state === 'waiting' || !item || (booking && sameBooking(item, booking))) return [];
      return [{ stageId: id, title: `${job.title}: ${title}`, state }];
    }),
  );
  if (begun.length > 0) shifts.begun = begun;
  const retired = retiredIn(facts);
  if (retired.length > 0) shifts.retired = retired;
  return Object.keys(shifts).length > 0 ? shifts : null;
}

function retiredIn({ resources, items, jobs }: Facts): { id: string; name: string }[] {
  const waiting = new Set(
    jobs.flatMap((job) => job.stages.filter(({ state }) => state === 'waiting').map(({ id }) => id)),
  );
  const used = new Set(
    [...items.values()]
      .filter(({ stageId }) => waiting.has(stageId))
      .flatMap(({ placeId, personId, lampIds }) => [placeId, personId ?? '', ...lampIds]),
  );
  const all = [resources.places, resources.people, resources.lamps].flat();
  return all.filter(({ id, retired }) => retired && used.has(id)).map(({ id, name }) => ({ id, name }));
}
