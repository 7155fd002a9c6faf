import type { Trx } from './in-shop.ts';

export type BookedOfPerson = {
  stageId: string;
  jobId: string;
  jobNumber: number;
  jobTitle: string;
  stageTitle: string;
  from: Date;
  to: Date;
};

const columns = {
  stageId: 'booking.stage_id',
  jobId: 'stage.job_id',
  jobNumber: 'job.number',
  jobTitle: 'job.title',
  stageTitle: 'stage.title',
};

const joined = (trx: Trx, shopId: string) =>
  trx('booking')
    .join('stage', (on) => on.on('stage.shop_id', 'booking.shop_id').on('stage.id', 'booking.stage_id'))
    .join('job', (on) => on.on('job.shop_id', 'stage.shop_id').on('job.id', 'stage.job_id'))
    .where({ 'booking.shop_id': shopId, 'job.state': 'open' })
    .whereIn('booking.state', ['planned', 'running']);

/** Posted work that names the person and is not over at `now`, by its start. */
export const bookingsOfPerson = (trx: Trx, shopId: string, personId: string, now: Date): Promise<BookedOfPerson[]> =>
  joined(trx, shopId)
    .andWhere({ 'booking.person_id': personId })
    .andWhereRaw('upper(booking.during) > ?', [now])
    .orderByRaw('lower(booking.during), booking.id')
    .select({ ...columns, from: trx.raw('lower(booking.during)'), to: trx.raw('upper(booking.during)') });

/** The stretches in which that work has the person's hands. */
export const handsOfPerson = (trx: Trx, shopId: string, personId: string, now: Date): Promise<BookedOfPerson[]> =>
  joined(trx, shopId)
    .join('occupancy', (on) => on.on('occupancy.shop_id', 'booking.shop_id').on('occupancy.booking_id', 'booking.id'))
    .andWhere({ 'occupancy.person_id': personId, 'booking.state': 'planned' })
    .andWhereRaw('upper(occupancy.during) > ?', [now])
    .orderByRaw('lower(occupancy.during), booking.id')
    .select({ ...columns, from: trx.raw('lower(occupancy.during)'), to: trx.raw('upper(occupancy.during)') });
