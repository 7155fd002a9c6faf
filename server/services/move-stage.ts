import { v7 as uuid } from 'uuid';
import type { Reason } from '#contracts/reasons.ts';
import type { Booked } from '../db/bookings.ts';
import { recordChange } from '../db/changes.ts';
import { deleteDraftItems, insertDraftItems, touchDraft, type Draft } from '../db/drafts.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import type { OpenStage } from '../db/open-jobs.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import { loadFacts, type Facts } from '../planning/facts.ts';
import type { Judged } from '../planning/judge.ts';
import { moveInDraft, type Move } from '../planning/move.ts';
import type { Actor } from '../policies.ts';
import type { DraftHead } from './open-draft.ts';
import { seenDraft } from './seen-draft.ts';

export type MoveInput = Move & { version: number; dryRun?: boolean | undefined };
export type MoveResult = {
  draft: DraftHead;
  reasons: Reason[];
  moved: { stageId: string; from: string; to: string; placeId: string; personId: string | null }[];
};

/**
 * Moves a stage in the open draft, with its load and the stages that stay where it leaves the part. `dryRun` only asks.
 * @throws {Refusal} not-found, stale, or refused with the rules that held before and would not any more.
 */
export function moveStage(deps: Deps, actor: Actor, input: MoveInput): Promise<MoveResult> {
  return inShop(deps.db, actor, async (trx) => {
    const draft = await seenDraft(trx, actor.shopId, input.version, { lock: input.dryRun !== true });
    const facts = await loadFacts(trx, actor.shopId, deps.now());
    const stage = stageToMove(facts, input);
    const start = new Date(Math.floor(input.start.getTime() / 60_000) * 60_000);
    const { changed, reasons, judged } = moveInDraft(facts, stage, { ...input, start }, uuid);
    const head = { id: draft.id, version: draft.version };
    const moved = changed.map(({ stageId, from, to, placeId, personId }) => ({
      stageId,
      from: from.toISOString(),
      to: to.toISOString(),
      placeId,
      personId,
    }));
    if (input.dryRun === true) return { draft: head, reasons, moved };
    if (reasons.length > 0) throw new Refusal('refused', { reasons });
    if (changed.length === 0 || judged === null) return { draft: head, reasons, moved };
    const version = await write(trx, actor, { draft, facts, changed, judged });
    return { draft: { id: draft.id, version }, reasons, moved };
  });
}

/** @throws {Refusal} not-found for a stage, place or person that the shop does not have; refused once it has begun. */
function stageToMove(facts: Facts, { stageId, placeId, personId }: MoveInput): OpenStage {
  const stage = facts.jobs.flatMap((job) => job.stages).find(({ id }) => id === stageId);
  const { places, people } = facts.resources;
  if (!stage || !places.some(({ id }) => id === placeId)) throw notFound();
  if (personId != null && !people.some(({ id }) => id === personId)) throw notFound();
  if (stage.state === 'waiting') return stage;
  const at = [stage.startedAt, stage.finishedAt].flatMap((instant) => instant?.toISOString() ?? []);
  const reason = { code: 'already-begun', rule: 13, stageId, ids: [], names: [stage.title], at, minutes: [] };
  throw new Refusal('refused', { reasons: [reason] });
}

async function write(
  trx: Trx,
  actor: Actor,
  { draft, facts, changed, judged }: { draft: Draft; facts: Facts; changed: Booked[]; judged: Judged },
): Promise<number> {
  // What has begun is no longer the draft's business.
  const stages = facts.jobs.flatMap((job) => job.stages);
  const begun = stages.filter(({ id, state }) => state !== 'waiting' && facts.items.has(id)).map(({ id }) => id);
  const ids = changed.map(({ stageId }) => stageId);
  await deleteDraftItems(trx, actor.shopId, draft.id, [...ids, ...begun]);
  await insertDraftItems(trx, actor.shopId, draft.id, changed);
  const missing = new Set(judged.plan.unplaced.map(({ job }) => job));
  const version = await touchDraft(trx, actor.shopId, draft.id, {
    at: facts.now,
    accountId: actor.accountId,
    cost: judged.verdict.cost,
    bound: null,
    unplaced: draft.unplaced.filter(({ jobId }) => missing.has(jobId)),
  });
  await recordChange(trx, actor, { kind: 'draft-changed', ids: [draft.id, ...ids] });
  return version;
}
