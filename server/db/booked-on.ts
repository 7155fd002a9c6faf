import type { Trx } from './in-shop.ts';

/** Posted work of one stage, and what it is called. */
export type BookedWork = {
  stageId: string;
  jobId: string;
  jobNumber: number;
  jobTitle: string;
  stageTitle: string;
  from: Date;
  to: Date;
};

/** Posted work that is neither done nor over and stands in a place or counts on a lamp, by its start. */
export async function bookedOn(
  trx: Trx,
  shopId: string,
  of: { placeId: string } | { lampId: string },
  now: Date,
): Promise<BookedWork[]> {
  const query = trx('booking')
    .join('stage', (on) => on.on('stage.shop_id', 'booking.shop_id').on('stage.id', 'booking.stage_id'))
    .join('job', (on) => on.on('job.shop_id', 'stage.shop_id').on('job.id', 'stage.job_id'))
    .where({ 'booking.shop_id': shopId, 'job.state': 'open' })
    .whereIn('booking.state', ['planned', 'running'])
    .andWhereRaw(`(upper(booking.during) > ? or booking.state = 'running')`, [now]);
  if ('placeId' in of) query.andWhere({ 'booking.place_id': of.placeId });
  else query.andWhereRaw('? = any (booking.lamp_ids)', [of.lampId]);
  return query.orderByRaw('lower(booking.during), booking.id').select({
    stageId: 'booking.stage_id',
    jobId: 'stage.job_id',
    jobNumber: 'job.number',
    jobTitle: 'job.title',
    stageTitle: 'stage.title',
    from: trx.raw('lower(booking.during)'),
    to: trx.raw('upper(booking.during)'),
  });
}
