import type { Trx } from './in-shop.ts';

const stagesOf = (trx: Trx, shopId: string, jobId: string) =>
  trx('stage').where({ shop_id: shopId, job_id: jobId }).select('id');

/** Cancels what is planned for a job and lets go of places, lamps and hands. Answers with how many bookings it were. */
export async function cancelBookingsOfJob(trx: Trx, shopId: string, jobId: string): Promise<number> {
  const cancelled = await trx('booking')
    .where({ shop_id: shopId, state: 'planned' })
    .whereIn('stage_id', stagesOf(trx, shopId, jobId))
    .update({ state: 'cancelled' })
    .increment('version', 1)
    .returning<{ id: string }[]>('id');
  await trx('occupancy')
    .where({ shop_id: shopId })
    .whereIn(
      'booking_id',
      cancelled.map((booking) => booking.id),
    )
    .delete();
  return cancelled.length;
}

/** Takes the job's stages out of the open draft and moves its version on; null where there is nothing to take. */
export async function dropDraftItemsOfJob(trx: Trx, shopId: string, jobId: string, now: Date): Promise<string | null> {
  const draft = await trx('draft')
    .where({ shop_id: shopId, state: 'open' })
    .forUpdate()
    .first<{ id: string } | undefined>('id');
  if (!draft) return null;
  const dropped = await trx('draft_item')
    .where({ shop_id: shopId, draft_id: draft.id })
    .whereIn('stage_id', stagesOf(trx, shopId, jobId))
    .delete();
  if (dropped === 0) return null;
  await trx('draft').where({ shop_id: shopId, id: draft.id }).update({ updated_at: now }).increment('version', 1);
  return draft.id;
}
