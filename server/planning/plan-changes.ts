import type { Booked } from '#server/db/bookings.ts';
import type { OpenJob, OpenStage } from '#server/db/open-jobs.ts';
import { sameBooking, type Facts } from './facts.ts';

/** A waiting stage that the draft has elsewhere, at another time or with other hands than the posted plan. */
export type PlanChange = { job: OpenJob; stage: OpenStage; before: Booked | null; after: Booked | null };

/** What changes for whoever works by the plan, in the order in which the draft has it. */
export function planChanges(facts: Facts): PlanChange[] {
  const changes = facts.jobs.flatMap((job) =>
    job.stages
      .filter(({ state }) => state === 'waiting')
      .map((stage): PlanChange => {
        const before = facts.bookings.get(stage.id) ?? null;
        const after = facts.items.get(stage.id) ?? null;
        return { job, stage, before, after };
      }),
  );
  const when = ({ before, after }: PlanChange): number => (after ?? before)?.from.getTime() ?? 0;
  return changes.filter(({ before, after }) => differ(before, after)).sort((a, b) => when(a) - when(b));
}

const differ = (before: Booked | null, after: Booked | null): boolean =>
  before && after ? !sameBooking(before, after) : before !== after;

/** The changes by person: what somebody gets, gives up, or has at another time or place. */
export function changesByPerson(changes: readonly PlanChange[]): Map<string, PlanChange[]> {
  const byPerson = new Map<string, PlanChange[]>();
  for (const change of changes) {
    const people = new Set([change.before?.personId, change.after?.personId]);
    for (const id of people) if (id) byPerson.set(id, [...(byPerson.get(id) ?? []), change]);
  }
  return byPerson;
}

/** The end of a job as it stands: null while a stage of it has no booking. */
export function endOfJob(job: OpenJob, standing: (stage: OpenStage) => Booked | null): Date | null {
  const ends = job.stages.map((stage) => stage.finishedAt ?? standing(stage)?.to ?? null);
  const known = ends.flatMap((end) => end ?? []);
  return known.length === job.stages.length && known.length > 0 ? new Date(Math.max(...known.map(Number))) : null;
}
