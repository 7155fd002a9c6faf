import { checkPlan } from '#planner/index.ts';
import type { Plan, Verdict, Violation } from '#planner/types.ts';
import { standingOf, type Facts } from './facts.ts';
import { buildProblem, sharedLoads, type Built, type Frame } from './problem/build-problem.ts';
import { toAssignment } from './problem/fixed.ts';

/** A plan made by hand, held against every rule. */
export type Judged = { built: Built; plan: Plan; verdict: Verdict };

// By hand a job may be placed one stage after the other; it is listed as not fully placed.
const ABOUT_WHOLE_JOBS = new Set(['half-unplaced', 'stage-missing', 'unplaced-without-reason']);

/**
 * Judges where everything stands in `facts` (the draft, or the posted plan where there is none). Stages in `loose` are
 * being moved, so they do not stand even where they are late. Nothing may start before `now`.
 */
export function judge(facts: Facts, frame: Frame, { loose, now }: { loose: ReadonlySet<string>; now: Date }): Judged {
  const built = buildProblem(facts, frame, { kind: 'judge', loose }, now);
  const { problem } = built;
  const fixed = new Set(problem.fixed.map(({ stage }) => stage));
  const stages = facts.jobs.flatMap((job) => job.stages).filter(({ id }) => !fixed.has(id));
  const placed = stages.flatMap((stage) => standingOf(facts, stage) ?? []).map((booked) => toAssignment(booked, frame));
  const there = new Set([...fixed, ...placed.map(({ stage }) => stage)]);
  const unplaced = problem.jobs.flatMap((job) => {
    const missing = job.stages.find(({ id }) => !there.has(id));
    return missing ? [{ job: job.id, stage: missing.id, reason: 'not placed' }] : [];
  });
  const plan: Plan = {
    version: 1,
    assignments: [...problem.fixed, ...sharedLoads(placed)],
    unplaced,
    cost: 0,
    stats: { evaluations: 0, improvements: 0 },
  };
  const verdict = checkPlan(problem, plan);
  const violations = verdict.violations.filter(({ code }) => !ABOUT_WHOLE_JOBS.has(code));
  return { built, plan, verdict: { ...verdict, violations } };
}

/** The same clash seen from either side, whatever its minutes. */
const clash = ({ code, stage, ids }: Violation): string => [code, ...[stage, ...ids].sort()].join(' ');

/** What is broken now and was not before. */
export function newlyBroken(before: readonly Violation[], after: readonly Violation[]): Violation[] {
  const known = new Set(before.map(clash));
  return after.filter((violation) => !known.has(clash(violation)));
}
