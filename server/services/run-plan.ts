import { setTimeout as sleep } from 'node:timers/promises';
import { v7 as uuid } from 'uuid';
import type { Plan, Progress } from '#planner/types.ts';
import { recordChange } from '../db/changes.ts';
import { deleteDraftItems, findOpenDraft, insertDraft, insertDraftItems, touchDraft } from '../db/drafts.ts';
import { inShop, type Scope, type Trx } from '../db/in-shop.ts';
import { loadOpenJobs } from '../db/open-jobs.ts';
import { changePlanRun, findPlanRun, type RunRow, type RunState } from '../db/plan-runs.ts';
import { findPlanNumber } from '../db/posted-plans.ts';
import { tryAgain } from '../db/try-again.ts';
import type { Deps } from '../deps.ts';
import { loadFacts, type Facts } from '../planning/facts.ts';
import { PlannerThreadDied, type PlannerThreads, type Search } from '../planning/planner-threads.ts';
import type { Built } from '../planning/problem/build-problem.ts';
import { problemToPlan } from '../planning/problem/problem-to-plan.ts';
import { airOfPlan } from '../planning/air/air-of-plan.ts';
import { readPlan, readUnplaced } from '../planning/read-plan.ts';

/** How often a run looks whether it shall stop and, where there is something new, tells how far it is. */
const LOOK_MILLISECONDS = 150;
const TELL_MILLISECONDS = 250;

const SAID = {
  died: 'The planner broke off twice. Nothing was changed. Start it again; if that does not help, plan by hand and tell whoever looks after the server.',
  overtaken: 'The plan was changed by hand while the planner worked, so nothing was replaced. Start the planner again.',
} as const;

type Begun = { run: RunRow; scope: Scope; facts: Facts; built: Built };

/**
 * Does a run that was asked for: reads the shop, lets a thread plan, and replaces the open draft whole in one transaction.
 * Safe to do again after a crash at any point: until the draft is replaced nothing has changed, after that the run is over.
 */
export async function runPlan(
  deps: Deps,
  threads: PlannerThreads,
  asked: { shopId: string; runId: string },
  signal: AbortSignal,
): Promise<void> {
  const begun = await tryAgain(() => begin(deps, asked));
  if (!begun) return;
  for (let left = 2; ; left -= 1) {
    try {
      const plan = await watch(deps, begun, threads, signal);
      signal.throwIfAborted();
      return await tryAgain(() => store(deps, begun, plan));
    } catch (error) {
      if (!(error instanceof PlannerThreadDied)) throw error;
      deps.log.error({ err: error, runId: asked.runId, left: left - 1 }, 'planning thread died');
      if (left === 1) return failPlanRun(deps, asked, SAID.died);
    }
  }
}

/** Ends a run that will not be done, with what the shop is told. */
export function failPlanRun(deps: Deps, asked: { shopId: string; runId: string }, said: string): Promise<void> {
  return inShop(deps.db, { shopId: asked.shopId, accountId: null }, async (trx) => {
    const run = await findPlanRun(trx, asked.shopId, asked.runId, { lock: true });
    if (run?.state !== 'queued' && run?.state !== 'running') return;
    await end(trx, { shopId: asked.shopId, accountId: run.requestedBy }, run, {
      state: 'failed',
      failure: said,
      at: deps.now(),
    });
  });
}

/** Null where there is nothing left to do. */
function begin(deps: Deps, { shopId, runId }: { shopId: string; runId: string }): Promise<Begun | null> {
  return inShop(deps.db, { shopId, accountId: null }, async (trx) => {
    const run = await findPlanRun(trx, shopId, runId, { lock: true });
    if (run?.state !== 'queued' && run?.state !== 'running') return null;
    const scope = { shopId, accountId: run.requestedBy };
    const at = deps.now();
    if (run.stopRequested) {
      await end(trx, scope, run, { state: 'stopped', failure: null, at });
      return null;
    }
    const facts = await loadFacts(trx, shopId, at);
    await changePlanRun(trx, shopId, runId, { state: 'running', startedAt: at });
    await recordChange(trx, scope, { kind: 'plan-run', ids: [runId] });
    return { run, scope, facts, built: problemToPlan(facts, run.scope, run.seconds) };
  });
}

async function watch(
  deps: Deps,
  { run, scope, built }: Begun,
  threads: PlannerThreads,
  signal: AbortSignal,
): Promise<Plan> {
  const news: { latest: Progress | null; told: number } = { latest: null, told: 0 };
  const { seed, seconds } = run;
  const search: Search = threads.search({
    problem: built.problem,
    seed,
    seconds,
    onProgress: (progress) => (news.latest = progress),
  });
  let over = false;
  const ended = search.plan.finally(() => (over = true));
  // Watched below; a failure that comes while something else is awaited is not unhandled.
  ended.catch(() => undefined);
  try {
    while (!over) {
      await Promise.race([ended, sleep(LOOK_MILLISECONDS)]);
      if (signal.aborted || (await stopWanted(deps, scope, run.id))) search.stop();
      if (news.latest === null || performance.now() - news.told < TELL_MILLISECONDS) continue;
      const progress = news.latest;
      news.latest = null;
      news.told = performance.now();
      await tell(deps, scope, run.id, progress);
    }
  } finally {
    search.stop();
  }
  return ended;
}

const stopWanted = (deps: Deps, scope: Scope, runId: string): Promise<boolean> =>
  inShop(deps.db, scope, async (trx) => (await findPlanRun(trx, scope.shopId, runId))?.stopRequested ?? true);

const tell = (deps: Deps, scope: Scope, runId: string, progress: Progress): Promise<void> =>
  inShop(deps.db, scope, async (trx) => {
    await changePlanRun(trx, scope.shopId, runId, { progress });
    await recordChange(trx, scope, { kind: 'plan-run', ids: [runId] });
  });

/** The draft is what it was when the run began, or nothing is replaced: nobody's work by hand is lost to a machine's. */
function store(deps: Deps, { run, scope, facts, built }: Begun, plan: Plan): Promise<void> {
  const { shopId } = scope;
  return inShop(deps.db, scope, async (trx) => {
    const now = await findPlanRun(trx, shopId, run.id, { lock: true });
    if (now?.state !== 'running') return;
    const at = deps.now();
    const draft = await findOpenDraft(trx, shopId, { lock: true });
    const same =
      draft?.id === facts.draft?.id &&
      draft?.version === facts.draft?.version &&
      (await findPlanNumber(trx, shopId)) === facts.resources.shop.planNumber;
    const head = same ? (draft ?? (await newDraft(trx, scope, at))) : undefined;
    if (!head) return end(trx, scope, now, { state: 'failed', failure: SAID.overtaken, at });
    // What has begun or was withdrawn meanwhile is not the draft's business.
    const jobs = await loadOpenJobs(trx, shopId);
    const waiting = new Set(
      jobs.flatMap(({ stages }) => stages.filter(({ state }) => state === 'waiting').map(({ id }) => id)),
    );
    const items = readPlan(facts, built, plan, uuid).filter(({ stageId }) => waiting.has(stageId));
    await deleteDraftItems(trx, shopId, head.id, 'all');
    await insertDraftItems(trx, shopId, head.id, items);
    await touchDraft(trx, shopId, head.id, {
      at,
      accountId: run.requestedBy,
      cost: plan.cost,
      bound: plan.bound ?? null,
      unplaced: readUnplaced(facts, built, plan),
      air: airOfPlan(facts.air, facts.now),
    });
    await recordChange(trx, scope, { kind: draft ? 'draft-changed' : 'draft-opened', ids: [head.id] });
    const progress = {
      cost: plan.cost,
      bound: plan.bound ?? null,
      evaluations: plan.stats.evaluations,
      unplaced: plan.unplaced.length,
    };
    await changePlanRun(trx, shopId, run.id, { progress, draftId: head.id });
    await end(trx, scope, now, { state: now.stopRequested ? 'stopped' : 'done', failure: null, at });
  });
}

/** Undefined where somebody has opened one this moment. */
async function newDraft(trx: Trx, scope: Scope, now: Date): Promise<{ id: string } | undefined> {
  const planNumber = await findPlanNumber(trx, scope.shopId);
  return insertDraft(trx, { ...scope, id: uuid(), planNumber, now });
}

async function end(
  trx: Trx,
  scope: Scope,
  run: RunRow,
  how: { state: RunState; failure: string | null; at: Date },
): Promise<void> {
  await changePlanRun(trx, scope.shopId, run.id, { state: how.state, failure: how.failure, finishedAt: how.at });
  await recordChange(trx, scope, { kind: 'plan-run', ids: [run.id] });
}
