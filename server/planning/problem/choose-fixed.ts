import type { Booked } from '#server/db/bookings.ts';
import type { OpenJob, OpenStage } from '#server/db/open-jobs.ts';
import { sameBooking, standingOf, type Facts } from '../facts.ts';

/**
 * What a problem is for. `plan`: the planner may move everything that has not begun, is not pinned and not about to start
 * (`rest`: nothing that is booked). `judge`: a plan made by hand is held against the rules; only what has begun stands,
 * and what should have begun by the posted plan, except for the stages in `loose`, which somebody is moving.
 */
export type Purpose =
  { kind: 'plan'; scope: 'all' | 'rest'; frozen: ReadonlySet<string> } | { kind: 'judge'; loose: ReadonlySet<string> };

export type Kept = { job: OpenJob; stage: OpenStage; booked: Booked | null };

/** Stages that stand. Where one of a load stands, all of it does; a waiting member goes with those that have begun. */
export function chooseFixed(facts: Facts, purpose: Purpose): Kept[] {
  const all = facts.jobs.flatMap((job) =>
    job.stages.map((stage): Kept => ({ job, stage, booked: standingOf(facts, stage) })),
  );
  const kept = all.filter((entry) => stands(entry, facts, purpose));
  const loads = new Set(kept.flatMap(({ stage, booked }) => (stage.state === 'done' ? [] : (booked?.loadId ?? []))));
  const mates = all.filter(({ stage, booked }) => stage.state === 'waiting' && booked && loads.has(booked.loadId));
  return [...new Set([...kept, ...mates])];
}

function stands({ stage, booked }: Kept, facts: Facts, purpose: Purpose): boolean {
  if (stage.state !== 'waiting') return true;
  if (booked === null) return false;
  if (purpose.kind === 'judge') return !purpose.loose.has(stage.id) && isOverdue(facts, booked);
  return booked.pinned || purpose.scope === 'rest' || purpose.frozen.has(stage.id);
}

/** Should have begun by the posted plan and nobody has tapped it: late, but no fault of a draft that leaves it there. */
function isOverdue(facts: Facts, booked: Booked): boolean {
  const posted = facts.bookings.get(booked.stageId);
  return posted !== undefined && booked.from < facts.now && sameBooking(posted, booked);
}

/** Posted to start so soon that people are getting ready for it; where a draft moved it by hand, it stands as moved. */
export function aboutToStart(facts: Facts): Set<string> {
  const until = new Date(facts.now.getTime() + facts.resources.shop.freezeMinutes * 60_000);
  const soon = [...facts.bookings.values()].filter(
    ({ state, from }) => state === 'planned' && from >= facts.now && from < until,
  );
  return new Set(soon.map(({ stageId }) => stageId));
}
