import type { Assignment, Plan } from '#planner/types.ts';
import type { Booked } from '#server/db/bookings.ts';
import type { UnplacedNote } from '#server/db/drafts.ts';
import { standingOf, type Facts } from './facts.ts';
import type { Built } from './problem/build-problem.ts';
import type { Clock } from './problem/clock.ts';
import { wayOfMode } from './problem/mode-id.ts';
import { sayNoWay } from './problem/refusals.ts';
import { personOf } from './problem/roster.ts';

/** A planner's assignment as a booking. */
export function toBooked(at: Assignment, clock: Clock, keep: { loadId: string; pinned: boolean }): Booked {
  return {
    stageId: at.stage,
    way: wayOfMode(at.mode),
    placeId: at.place,
    personId: at.person === null ? null : personOf(at.person),
    lampIds: at.lamps,
    loadId: keep.loadId,
    from: clock.instant(at.start),
    to: clock.instant(at.end),
    phases: at.phases.map(([from, to]): [number, number] => [from - at.start, to - at.start]),
    pinned: keep.pinned,
  };
}

/**
 * What the planner made, as the items of a draft: every stage that has not begun. Fixed ones stay to the letter; loads
 * keep the id they had where they can, so that what has not moved reads as unchanged.
 */
export function readPlan(facts: Facts, built: Built, plan: Plan, newId: () => string): Booked[] {
  const stages = new Map(facts.jobs.flatMap((job) => job.stages.map((stage) => [stage.id, stage] as const)));
  const fixed = new Set(built.problem.fixed.map(({ stage }) => stage));
  const before = (stageId: string): Booked | null => {
    const stage = stages.get(stageId);
    return stage ? standingOf(facts, stage) : null;
  };
  const stands = [...fixed].flatMap((stage) => before(stage) ?? []);
  const used = new Set(stands.map(({ loadId }) => loadId));
  const ids = new Map<string, string>();
  const loadIdOf = (at: Assignment): string => {
    const key = at.load ?? at.stage;
    const known = ids.get(key);
    if (known !== undefined) return known;
    const old = before(at.stage)?.loadId;
    const id = old !== undefined && !used.has(old) ? old : newId();
    used.add(id);
    ids.set(key, id);
    return id;
  };
  const made = plan.assignments
    .filter(({ stage }) => !fixed.has(stage))
    .map((at) => toBooked(at, built.clock, { loadId: loadIdOf(at), pinned: false }));
  return [...stands.filter(({ stageId }) => stages.get(stageId)?.state === 'waiting'), ...made];
}

/** Jobs without room, with reasons in plain words: names instead of ids, and what the chemistry rules out before all. */
export function readUnplaced(facts: Facts, built: Built, plan: Plan): UnplacedNote[] {
  const { resources } = facts;
  const named = [...resources.places, ...resources.people, ...resources.lamps, ...resources.circuits];
  const jobs = new Map(facts.jobs.map((job) => [job.id, job]));
  return plan.unplaced.map((unplaced) => {
    const job = jobs.get(unplaced.job);
    const stuck = job?.stages.find(({ id }) => built.offers.get(id)?.modes.length === 0);
    if (!stuck) {
      const reason = named.reduce((text, { id, name }) => text.replaceAll(id, name), unplaced.reason);
      return { jobId: unplaced.job, stageId: unplaced.stage, reason };
    }
    const refused = built.offers.get(stuck.id)?.refused ?? new Map<string, never>();
    const list = stuck.ways.flatMap(({ id, label }) => {
      const refusal = refused.get(id);
      return refusal ? [{ label, refusal }] : [];
    });
    return { jobId: unplaced.job, stageId: stuck.id, reason: sayNoWay(list) };
  });
}
