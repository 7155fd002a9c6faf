import { v7 as uuid } from 'uuid';
import type { PlanAir } from './air.ts';
import { bookedColumns, bookedRow, rangeOf, type Booked } from './bookings.ts';
import type { Trx } from './in-shop.ts';

export type DraftItem = Booked & { id: string };
export type UnplacedNote = { jobId: string; stageId: string | null; reason: string };
export type Draft = {
  id: string;
  /** Number of the posted plan it grew from. */
  planNumber: number;
  version: number;
  cost: number | null;
  bound: number | null;
  unplaced: UnplacedNote[];
  updatedBy: string | null;
  updatedAt: Date;
  /** The air the planner made it with; null: it was made by hand. */
  air: PlanAir | null;
};

const draftColumns = {
  id: 'id',
  planNumber: 'plan_number',
  version: 'version',
  cost: 'cost',
  bound: 'bound',
  unplaced: 'unplaced',
  updatedBy: 'updated_by',
  updatedAt: 'updated_at',
  air: 'air',
} as const;

/** The shop's open draft, if there is one. `lock`: nobody else changes it until this transaction ends. */
export async function findOpenDraft(trx: Trx, shopId: string, { lock }: { lock: boolean }): Promise<Draft | undefined> {
  const query = trx('draft').where({ shop_id: shopId, state: 'open' }).select<Draft[]>(draftColumns);
  return (await (lock ? query.forUpdate() : query))[0];
}

export async function loadDraftItems(trx: Trx, shopId: string, draftId: string): Promise<DraftItem[]> {
  return trx('draft_item')
    .where({ shop_id: shopId, draft_id: draftId })
    .orderByRaw('lower(during), id')
    .select({ id: 'id', ...bookedColumns, from: trx.raw('lower(during)'), to: trx.raw('upper(during)') });
}

/** Undefined where somebody opened one a moment earlier. */
export async function insertDraft(
  trx: Trx,
  draft: { shopId: string; id: string; planNumber: number; accountId: string | null; now: Date },
): Promise<{ id: string; version: number } | undefined> {
  const rows = await trx('draft')
    .insert({
      shop_id: draft.shopId,
      id: draft.id,
      plan_number: draft.planNumber,
      created_by: draft.accountId,
      updated_by: draft.accountId,
      created_at: draft.now,
      updated_at: draft.now,
    })
    // The index allows one open draft a shop.
    .onConflict(trx.raw(`(shop_id) where state = 'open'`))
    .ignore()
    .returning(['id', 'version']);
  return (rows as { id: string; version: number }[])[0];
}

export async function insertDraftItems(
  trx: Trx,
  shopId: string,
  draftId: string,
  items: readonly Booked[],
): Promise<void> {
  const rows = items.map((item) => ({
    shop_id: shopId,
    id: uuid(),
    draft_id: draftId,
    ...bookedRow(item),
    during: rangeOf(trx, item),
  }));
  await trx.batchInsert('draft_item', rows, 500);
}

export async function deleteDraftItems(
  trx: Trx,
  shopId: string,
  draftId: string,
  stageIds: readonly string[] | 'all',
): Promise<void> {
  const query = trx('draft_item').where({ shop_id: shopId, draft_id: draftId });
  await (stageIds === 'all' ? query : query.whereIn('stage_id', stageIds)).delete();
}

/** Counts the version up; answers the new one. */
export async function touchDraft(
  trx: Trx,
  shopId: string,
  draftId: string,
  change: {
    at: Date;
    accountId: string | null;
    cost?: number | null;
    bound?: number | null;
    unplaced?: readonly UnplacedNote[];
    air?: PlanAir;
  },
): Promise<number> {
  const { at, accountId, unplaced, air, ...figures } = change;
  const rows = await trx('draft')
    .where({ shop_id: shopId, id: draftId, state: 'open' })
    .update({
      ...figures,
      ...(unplaced ? { unplaced: JSON.stringify(unplaced) } : {}),
      ...(air ? { air: JSON.stringify(air) } : {}),
      version: trx.raw('version + 1'),
      updated_by: accountId,
      updated_at: at,
    })
    .returning<{ version: number }[]>('version');
  const row = rows[0];
  if (!row) throw new Error('The draft was closed inside the transaction that had locked it.');
  return row.version;
}

export async function closeDraft(
  trx: Trx,
  shopId: string,
  draftId: string,
  closed: { state: 'posted' | 'dropped'; at: Date; accountId: string | null },
): Promise<void> {
  await trx('draft')
    .where({ shop_id: shopId, id: draftId, state: 'open' })
    .update({
      state: closed.state,
      updated_at: closed.at,
      updated_by: closed.accountId,
      version: trx.raw('version + 1'),
    });
}
