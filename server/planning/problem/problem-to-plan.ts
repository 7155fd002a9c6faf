import { checkPlan } from '#planner/index.ts';
import type { Facts } from '../facts.ts';
import { buildProblem, frameOf, type Built, type Frame } from './build-problem.ts';
import { aboutToStart, type Purpose } from './choose-fixed.ts';

/** A plan is read, compared and posted before the first of its stages can start. */
const READING_MINUTES = 5;

/**
 * The problem for a run of the planner that takes `seconds`. Posted work that starts within the shop's freeze time stands,
 * as long as no rule is broken by what has happened since (a breakdown, an overrun): a job with a broken one is planned anew.
 */
export function problemToPlan(facts: Facts, scope: 'all' | 'rest', seconds: number): Built {
  const frame = frameOf(facts);
  const now = new Date(facts.now.getTime() + seconds * 1000 + READING_MINUTES * 60_000);
  const soon = aboutToStart(facts);
  const broken = scope === 'all' && soon.size > 0 ? brokenJobs(facts, frame, soon) : new Set<string>();
  const stageJob = new Map(facts.jobs.flatMap((job) => job.stages.map((stage) => [stage.id, job.id] as const)));
  const frozen = new Set([...soon].filter((stage) => !broken.has(stageJob.get(stage) ?? '')));
  return buildProblem(facts, frame, { kind: 'plan', scope, frozen }, now);
}

/** Jobs with a stage about to start that breaks a rule beside what has really happened. */
function brokenJobs(facts: Facts, frame: Frame, soon: ReadonlySet<string>): Set<string> {
  const only = (frozen: ReadonlySet<string>): Built => {
    const purpose: Purpose = { kind: 'plan', scope: 'all', frozen };
    return buildProblem(facts, frame, purpose, facts.now);
  };
  const frozen = only(soon).problem.fixed.filter(({ stage }) => soon.has(stage));
  const { problem } = only(new Set());
  const assignments = [
    ...problem.fixed,
    ...frozen.filter(({ stage }) => !problem.fixed.some((f) => f.stage === stage)),
  ];
  const unplaced = problem.jobs.map((job) => ({ job: job.id, stage: job.stages[0]?.id ?? '', reason: 'not asked' }));
  const { violations } = checkPlan(problem, {
    version: 1,
    assignments,
    unplaced,
    cost: 0,
    stats: { evaluations: 0, improvements: 0 },
  });
  const guilty = new Set(violations.map(({ stage }) => stage));
  return new Set(facts.jobs.filter((job) => job.stages.some(({ id }) => guilty.has(id))).map(({ id }) => id));
}
