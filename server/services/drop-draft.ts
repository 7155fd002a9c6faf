import { recordChange } from '../db/changes.ts';
import { closeDraft, findOpenDraft } from '../db/drafts.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';
import { seenDraft } from './seen-draft.ts';

/**
 * Throws the open draft away; the posted plan stays. Dropping what is gone already is done.
 * @throws {Refusal} stale where somebody has changed it since.
 */
export function dropDraft(deps: Deps, actor: Actor, version: number): Promise<Record<string, never>> {
  return inShop(deps.db, actor, async (trx) => {
    if (!(await findOpenDraft(trx, actor.shopId, { lock: true }))) return {};
    const draft = await seenDraft(trx, actor.shopId, version, { lock: true });
    await closeDraft(trx, actor.shopId, draft.id, { state: 'dropped', at: deps.now(), accountId: actor.accountId });
    await recordChange(trx, actor, { kind: 'draft-dropped', ids: [draft.id] });
    return {};
  });
}
