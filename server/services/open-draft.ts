import { v7 as uuid } from 'uuid';
import { loadOpenBookings } from '../db/bookings.ts';
import { recordChange } from '../db/changes.ts';
import { findOpenDraft, insertDraft, insertDraftItems } from '../db/drafts.ts';
import { inShop, type Scope, type Trx } from '../db/in-shop.ts';
import { findPlanNumber } from '../db/posted-plans.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';

export type DraftHead = { id: string; version: number };

/** The shop's open draft; where there is none, a new one that says what the posted plan says of work not begun. */
export function openDraft(deps: Deps, actor: Actor): Promise<DraftHead> {
  return inShop(deps.db, actor, (trx) => openDraftIn(trx, actor, deps.now()));
}

async function openDraftIn(trx: Trx, scope: Scope, now: Date): Promise<DraftHead> {
  const open = await findOpenDraft(trx, scope.shopId, { lock: false });
  if (open) return { id: open.id, version: open.version };
  const planNumber = await findPlanNumber(trx, scope.shopId);
  const made = await insertDraft(trx, { ...scope, id: uuid(), planNumber, now });
  // Somebody was quicker; the insert has waited for them, so theirs can be seen now.
  if (!made) return openDraftIn(trx, scope, now);
  const bookings = await loadOpenBookings(trx, scope.shopId);
  await insertDraftItems(
    trx,
    scope.shopId,
    made.id,
    bookings.filter(({ state }) => state === 'planned'),
  );
  await recordChange(trx, scope, { kind: 'draft-opened', ids: [made.id] });
  return made;
}
