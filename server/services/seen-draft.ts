import { findOpenDraft, type Draft } from '../db/drafts.ts';
import type { Trx } from '../db/in-shop.ts';
import { Refusal } from '../errors.ts';

/**
 * The open draft in the version that somebody has seen. `lock`: nobody else changes it until this transaction ends.
 * @throws {Refusal} stale with the draft as it is now; `current` null where it was posted or dropped meanwhile.
 */
export async function seenDraft(
  trx: Trx,
  shopId: string,
  version: number,
  { lock }: { lock: boolean },
): Promise<Draft> {
  const draft = await findOpenDraft(trx, shopId, { lock });
  if (draft?.version === version) return draft;
  throw new Refusal('stale', { current: draft ? { id: draft.id, version: draft.version } : null });
}
