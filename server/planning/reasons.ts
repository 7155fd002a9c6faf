import type { Reason } from '#contracts/reasons.ts';
import type { Way } from '#contracts/sheets.ts';
import type { Violation, ViolationCode } from '#planner/types.ts';
import { standingOf, type Facts } from './facts.ts';
import type { Built } from './problem/build-problem.ts';
import { heatRefusedAt } from './problem/heat.ts';
import { personOf } from './problem/roster.ts';

/** Which of a violation's figures are moments (`t`) and which are lengths, counts or phase numbers (`m`). */
const FIGURES: Partial<Record<ViolationCode, string>> = {
  'before-now': 'tt',
  'after-horizon': 'tt',
  'before-release': 'tt',
  'place-taken': 'tt',
  'rack-full': 't',
  'place-closed': 'tt',
  'lamp-closed': 'tt',
  'off-shift': 'mtt',
  'person-busy': 'ttt',
  'nobody-there': 'mtt',
  'lamp-busy': 'ttm',
  'circuit-full': 't',
  'spray-meets-lamp': 'tttt',
};

/**
 * Broken rules as the reasons of the interface. Where a way or a person is not allowed, the cause is said instead:
 * `heat-limit`, `heat-minutes`, `booth-heat` and the other codes of `problem/refusals.ts`, or `training-lapsed`.
 */
export function toReasons(facts: Facts, built: Built, violations: readonly Violation[]): Reason[] {
  const names = namesOf(facts);
  const seen = new Set<string>();
  return violations.flatMap((violation) => {
    const reason = toReason(facts, built, violation, names);
    const key = JSON.stringify(reason);
    if (seen.has(key)) return [];
    seen.add(key);
    return [reason];
  });
}

function toReason(facts: Facts, built: Built, violation: Violation, names: Map<string, string>): Reason {
  const ids = violation.ids.map(personOf);
  const figures = FIGURES[violation.code] ?? '';
  const base: Reason = {
    code: violation.code,
    rule: violation.rule,
    stageId: violation.stage,
    ids,
    names: ids.map((id) => names.get(id) ?? id),
    at: violation.minutes
      .filter((_, i) => figures[i] === 't')
      .map((minute) => built.clock.instant(minute).toISOString()),
    minutes: violation.minutes.filter((_, i) => figures[i] !== 't'),
  };
  return causeOf(facts, built, violation, base) ?? base;
}

function causeOf(facts: Facts, built: Built, violation: Violation, base: Reason): Reason | null {
  const stage = facts.jobs.flatMap((job) => job.stages).find(({ id }) => id === violation.stage);
  const booked = stage ? standingOf(facts, stage) : null;
  if (!stage || !booked) return null;
  const way = stage.ways.find(({ id }) => id === booked.way);
  const refusal = built.offers.get(stage.id)?.refused.get(booked.way);
  if (violation.code === 'unknown-mode' && refusal)
    return { ...base, code: refusal.code, names: way ? [way.label] : base.names, minutes: [...refusal.figures] };
  const person = facts.resources.people.find(({ id }) => id === booked.personId);
  const sprays = way?.phases.some((phase) => phase.kind === 'spray') ?? false;
  const skilled = person !== undefined && (way?.skill == null || person.skills.includes(way.skill));
  if (violation.code === 'person-not-allowed' && sprays && skilled && !person.retired)
    return { ...base, code: 'training-lapsed' };
  const place = facts.resources.places.find(({ id }) => id === booked.placeId);
  if (violation.code !== 'place-not-allowed' || !place) return null;
  const heat = waysThere(facts, stage.id).flatMap((there) => heatRefusedAt(there, place) ?? [])[0];
  return heat ? { ...base, code: heat.code, minutes: [...heat.figures] } : null;
}

/** The way of a stage, and of those that are done where it leaves the part. */
function waysThere(facts: Facts, stageId: string): Way[] {
  const stages = facts.jobs.find((job) => job.stages.some(({ id }) => id === stageId))?.stages ?? [];
  const first = stages.findIndex(({ id }) => id === stageId);
  const ways = stages.slice(first).map((stage) => stage.ways.find(({ id }) => id === standingOf(facts, stage)?.way));
  const end = ways.findIndex((way, i) => i > 0 && way?.stay !== true);
  return ways.slice(0, end < 0 ? undefined : end).flatMap((way) => way ?? []);
}

/** Names by id of everything a reason may speak of. */
export function namesOf({ resources, jobs }: Facts): Map<string, string> {
  const named = [resources.places, resources.people, resources.lamps, resources.circuits, resources.zones].flat();
  const names = new Map<string, string>(named.map(({ id, name }) => [id, name]));
  for (const job of jobs) {
    names.set(job.id, job.title);
    for (const stage of job.stages) names.set(stage.id, `${job.title}: ${stage.title}`);
  }
  return names;
}
