import type { Clash } from '#contracts/clashes.ts';
import type { Violation } from '#planner/types.ts';
import type { Trx } from '#server/db/in-shop.ts';
import { loadFacts, type Facts } from './facts.ts';
import { judge, newlyBroken, type Judged } from './judge.ts';
import { frameOf } from './problem/build-problem.ts';
import { toReasons } from './reasons.ts';

type Look = { facts: Facts; judged: Judged };

/** The posted plan as it stands, held against every rule; an open draft is left out of it. */
async function lookAt(trx: Trx, shopId: string, now: Date): Promise<Look> {
  const facts: Facts = { ...(await loadFacts(trx, shopId, now)), draft: null, items: new Map() };
  return { facts, judged: judge(facts, frameOf(facts), { loose: new Set(), now }) };
}

/**
 * Does `write` and tells which posted work was in order before it and is not any more. The work stands where it is:
 * somebody plans again, or works on with open eyes.
 */
export async function tellClashes<T>(
  trx: Trx,
  shopId: string,
  now: Date,
  write: () => Promise<T>,
): Promise<{ done: T; clashes: Clash[] }> {
  const before = await lookAt(trx, shopId, now);
  // Without work in the shop there is nothing to look at twice.
  if (before.facts.bookings.size === 0) return { done: await write(), clashes: [] };
  const done = await write();
  const after = await lookAt(trx, shopId, now);
  const broken = newlyBroken(before.judged.verdict.violations, after.judged.verdict.violations);
  return { done, clashes: clashesOf(after, broken) };
}

/** One for each stage, the first reason of each, in order of time. */
function clashesOf({ facts, judged }: Look, broken: readonly Violation[]): Clash[] {
  const reasons = toReasons(facts, judged.built, broken);
  const stages = new Map(facts.jobs.flatMap((job) => job.stages.map((stage) => [stage.id, { job, stage }] as const)));
  const found = new Map<string, Clash>();
  for (const reason of reasons) {
    const at = reason.stageId === null ? undefined : stages.get(reason.stageId);
    const booked = at && facts.bookings.get(at.stage.id);
    if (!at || !booked || at.stage.state !== 'waiting' || found.has(at.stage.id)) continue;
    found.set(at.stage.id, {
      stageId: at.stage.id,
      jobId: at.job.id,
      jobNumber: at.job.number,
      jobTitle: at.job.title,
      stageTitle: at.stage.title,
      from: booked.from.toISOString(),
      to: booked.to.toISOString(),
      reason,
    });
  }
  return [...found.values()].sort((a, b) => a.from.localeCompare(b.from));
}
